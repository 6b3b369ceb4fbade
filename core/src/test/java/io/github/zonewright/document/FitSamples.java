package io.github.zonewright.document;

import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.Discrimination;
import io.github.zonewright.indexing.Discrimination.TellingSpot;
import io.github.zonewright.indexing.Grain;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SolutionErrors;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import io.github.zonewright.spots.SpotEdit;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.Set;

/** Fits to keep: invented numbers with all their digits. */
final class FitSamples {
    static final Crystal NICKEL = Crystal.of("nickel", Lattice.cubic(3.524), "F m -3 m", AtomSite.of("Ni", 0, 0, 0));

    private FitSamples() {}

    /** A triclinic cell of random edges and angles, whose radians are those of no round degrees. */
    static Crystal triclinic(Random random) {
        Lattice lattice = new Lattice(
                4 + random.nextDouble(),
                5 + random.nextDouble(),
                6 + random.nextDouble(),
                1.5 + 0.3 * random.nextDouble(),
                1.5 + 0.3 * random.nextDouble(),
                1.5 + 0.3 * random.nextDouble());
        return Crystal.of(
                "triclinic",
                lattice,
                "P -1",
                AtomSite.of("Si", random.nextDouble(), random.nextDouble(), random.nextDouble())
                        .withOccupancy(random.nextDouble()));
    }

    static Placement placement(Crystal crystal, Random random) {
        Camera camera = new Camera(
                new PixelPoint(512 * random.nextDouble(), 512 * random.nextDouble()),
                1000 * random.nextDouble(),
                1 + 0.1 * random.nextDouble(),
                random.nextGaussian(),
                random.nextBoolean());
        ZoneSetting setting = new ZoneSetting(
                new Uvw(1, -1, 0),
                new Hkl(1, 1, 0),
                2 * Math.PI * (random.nextDouble() - 0.5),
                0.1 * random.nextGaussian(),
                0.1 * random.nextGaussian());
        return new Placement(crystal, Beam.ofKilovolts(60 + 240 * random.nextDouble()), setting, camera);
    }

    static MeasuredSpot spot(Random random) {
        return new MeasuredSpot(
                new PixelPoint(1024 * random.nextDouble(), 1024 * random.nextDouble()),
                random.nextDouble() + 1e-9,
                1e6 * random.nextDouble(),
                100 * random.nextDouble(),
                random.nextBoolean());
    }

    static Solution solution(Placement placement, int explained, int unexplained, Random random) {
        List<SpotMatch> matches = new ArrayList<>();
        for (int i = 0; i < explained; i++) {
            Hkl hkl = new Hkl(random.nextInt(9) - 4, random.nextInt(9) - 4, random.nextInt(9) - 4);
            matches.add(new SpotMatch(
                    spot(random), hkl, new PixelPoint(1024 * random.nextDouble(), 1024 * random.nextDouble())));
        }
        List<MeasuredSpot> rest = new ArrayList<>();
        for (int i = 0; i < unexplained; i++) {
            rest.add(spot(random));
        }
        SolutionErrors errors = new SolutionErrors(
                1e-3 * random.nextDouble(),
                1e-3 * random.nextDouble(),
                1e-3 * random.nextDouble(),
                random.nextDouble(),
                random.nextDouble(),
                random.nextDouble());
        Optional<Orientation> mate = Optional.of(random.nextBoolean())
                .filter(b -> b)
                .map(b -> new Orientation(Rotation.ofQuaternion(
                        random.nextGaussian(), random.nextGaussian(), random.nextGaussian(), random.nextGaussian())));
        return new Solution(placement, matches, rest, random.nextDouble(), 100 * random.nextDouble(), errors, mate);
    }

    /** A solution on nickel with a mate, 3 explained spots and 2 left over. */
    static Solution ordinary() {
        Solution s = solution(placement(NICKEL, new Random(11)), 3, 2, new Random(12));
        return new Solution(
                s.placement(),
                s.matches(),
                s.unexplained(),
                s.rmsResidual(),
                s.score(),
                s.errors(),
                Optional.of(new Orientation(Rotation.ofQuaternion(1, 2, 3, 4))),
                List.of(),
                OptionalDouble.of(7.25));
    }

    /** A twin and a crystal of another kind beside {@link #ordinary}, and what tells it from its half turn. */
    static FitFindings findings() {
        Random random = new Random(21);
        Placement first = ordinary().placement();
        Rotation law = Rotation.ofAxisAngle(new Vector3(1, 1, -1), Math.PI);
        Orientation twin = new Orientation(first.orientation().rotation().after(law));
        Placement twinned =
                first.withSetting(ZoneSetting.of(twin, NICKEL.lattice(), new Uvw(-1, 1, 0), new Hkl(1, 1, 0)));
        Solution second = solution(twinned, 4, 2, random);
        Solution third = solution(placement(triclinic(random), random), 5, 1, random);
        TellingSpot seen = new TellingSpot(
                new Hkl(1, -3, 1), true, new PixelPoint(31.25, 77.5), 0.4, 1.0 / 3, Discrimination.Sight.NOT_SEEN);
        TellingSpot outside = new TellingSpot(
                new Hkl(2, 0, 2), false, new PixelPoint(-31.1, 7), 0.2, 0, Discrimination.Sight.OUTSIDE);
        return new FitFindings(
                List.of(Grain.of(second, second.matches().subList(1, 3), first), Grain.of(third, List.of(), first)),
                Optional.of(new ToldApart(
                        "half a turn",
                        List.of(
                                "They stand to each other by 60.00° about [1 1 1].",
                                "Tilt by 12.3° about the axis at -31°."),
                        List.of(seen, outside),
                        Optional.of(new Vector3(0.123456789, -0.0987654321, 0)))));
    }

    /** Everything that a person can set, on an image of so many px. */
    static FitHandling handling(int width, int height) {
        Mask stop = Mask.of(
                width,
                height,
                i -> i % width < 7 && i / width > 3 && i / width < 9 || i == 2 * width - 1 || i == 2 * width);
        return new FitHandling(
                OptionalDouble.of(123.4),
                Optional.of(true),
                Optional.of(stop),
                List.of(
                        new SpotEdit(SpotEdit.Way.ADD, new PixelPoint(1.1, 2.2), Optional.empty()),
                        new SpotEdit(
                                SpotEdit.Way.MOVE, new PixelPoint(3, 4), Optional.of(new PixelPoint(5.5, 1.0 / 3))),
                        new SpotEdit(SpotEdit.Way.REMOVE, new PixelPoint(7, 8), Optional.empty()),
                        new SpotEdit(SpotEdit.Way.CENTRE, new PixelPoint(9, 10), Optional.empty()),
                        new SpotEdit(SpotEdit.Way.FIND_CENTRE, new PixelPoint(0, 0), Optional.empty())),
                Set.of("legend", "scale_bar"));
    }
}
