package io.github.zonewright.document;

import io.github.zonewright.crystal.AtomSite;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.image.PixelPoint;
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
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;

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
}
