package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.ReciprocalLattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.stream.IntStream;

/**
 * Indexes two or more clicked spots by the classic way: their spacings name families of reflections, the angle between them
 * picks the members, and two members make a zone axis. Source of the method: Andrews, Dyson & Keown, Interpretation of
 * Electron Diffraction Patterns (1967), from memory.
 *
 * <p>An answer needs every spacing within the tolerance of the camera constant and the clicks' own, ratios of spacings within
 * the clicks' own, and every angle within its tolerance; answers are ranked by how well they fit. Known limits: the
 * crystal is taken to be on zone; reflections that are extinct do not count; two spots leave many answers, above all in large
 * cells, and a spot that is clicked wrong spoils them all.
 */
public final class HandIndexing {

    /** How far a click may miss a spot: as a share of its distance from the centre, for spacings' ratios. */
    public static final double CLICK_TOLERANCE = 0.02;

    /** How far the angle between two clicked spots may be off, in radians. */
    public static final double ANGLE_TOLERANCE = Math.toRadians(2);

    private static final int MOST_ANSWERS = 50;
    private static final double SAME_ORIENTATION = Math.toRadians(2.5);
    private static final double ONE_ROW = Math.sin(Math.toRadians(3));

    private final List<Crystal> crystals;
    private final Beam beam;
    private final Camera camera;
    private final double tolerance;

    private HandIndexing(List<Crystal> crystals, Beam beam, Camera camera, double tolerance) {
        this.crystals = List.copyOf(crystals);
        this.beam = beam;
        this.camera = camera;
        this.tolerance = tolerance;
    }

    /**
     * Indexing for some crystals.
     *
     * @param crystals what the pattern may be of
     * @param beam the beam
     * @param camera centre, camera constant and ellipse as far as they are known
     * @param tolerance how far the camera constant may be off, as a share of it, 0 to 0.2
     * @return the indexing
     * @throws IllegalArgumentException if there is no crystal or the tolerance is out of range
     */
    public static HandIndexing of(List<Crystal> crystals, Beam beam, Camera camera, double tolerance) {
        if (crystals.isEmpty()) {
            throw new IllegalArgumentException("crystals to index for: none, expected at least one");
        }
        if (!(tolerance >= 0 && tolerance <= 0.2)) {
            throw new IllegalArgumentException(
                    "tolerance of the camera constant: " + tolerance + ", expected a share from 0 to 0.2");
        }
        return new HandIndexing(crystals, beam, camera, tolerance);
    }

    /**
     * Lists the zones and rotations that fit.
     *
     * @param clicked two or more spots, not all on one row through the centre
     * @return the answers, best first, at most {@value #MOST_ANSWERS}; of those that symmetry or half a turn about the zone
     *     axis makes one only the first
     * @throws IllegalArgumentException if there are fewer than two spots, one lies on the centre, or all lie on one row,
     *     which belongs to many zones
     */
    public List<HandAnswer> index(List<ClickedSpot> clicked) {
        List<Vector2> places = clicked.stream()
                .map(c -> camera.toReciprocal(c.position(), beam.wavelength()))
                .toList();
        check(clicked, places);
        List<HandAnswer> answers = new ArrayList<>();
        for (Crystal crystal : crystals) {
            double farthest = places.stream().mapToDouble(Vector2::norm).max().orElseThrow();
            ReflectionStrengths strengths =
                    new ReflectionStrengths(crystal, beam, farthest * (1 + tolerance) * (1 + CLICK_TOLERANCE));
            extend(new Trial(crystal, strengths, clicked, places), List.of(), answers);
        }
        answers.sort(Comparator.comparingDouble(HandAnswer::misfit)
                .thenComparingInt(a -> a.placement().setting().zone().largestIndex())
                .thenComparing(a -> a.placement().setting().zone(), Comparator.reverseOrder())
                .thenComparing(a -> a.indices().get(0), Comparator.reverseOrder()));
        return different(answers);
    }

    private void check(List<ClickedSpot> clicked, List<Vector2> places) {
        if (clicked.size() < 2) {
            throw new IllegalArgumentException("clicked spots: " + clicked.size() + ", expected at least 2");
        }
        for (int i = 0; i < places.size(); i++) {
            if (clicked.get(i).position().distanceTo(camera.centre()) < 1) {
                throw new IllegalArgumentException("clicked spot " + (i + 1) + ": "
                        + clicked.get(i).position() + " is the centre, expected a diffracted spot");
            }
        }
        Vector2 first = places.get(0);
        if (places.stream().allMatch(p -> Math.abs(p.cross(first)) < ONE_ROW * p.norm() * first.norm())) {
            throw new IllegalArgumentException("clicked spots: all " + clicked.size()
                    + " lie on one row through the centre, which many zones share; expected one beside it");
        }
    }

    private record Trial(
            Crystal crystal, ReflectionStrengths strengths, List<ClickedSpot> clicked, List<Vector2> places) {}

    /** Gives the next spot every reflection that suits it and those before. */
    private void extend(Trial trial, List<Hkl> chosen, List<HandAnswer> answers) {
        int i = chosen.size();
        if (i == trial.places.size()) {
            answers.add(answer(trial, chosen));
            return;
        }
        List<Hkl> all = trial.clicked.get(i).hkl().map(List::of).orElseGet(() -> suiting(trial, i));
        for (Hkl hkl : all) {
            List<Hkl> more = new ArrayList<>(chosen);
            more.add(hkl);
            if (suits(trial, more)) {
                extend(trial, more, answers);
            }
        }
    }

    /** Of the first spot one reflection of each set that the proper rotations of the Laue class make equal is enough. */
    private List<Hkl> suiting(Trial trial, int i) {
        boolean free = i == 0 && trial.clicked.stream().allMatch(c -> c.hkl().isEmpty());
        List<Hkl> found = new ArrayList<>();
        trial.strengths.reflections().forEach(r -> {
            boolean again = free
                    && trial.crystal.spaceGroup().properLaueRotations().stream()
                            .anyMatch(o -> found.contains(o.apply(r.hkl())));
            if (!again && Math.abs(spacing(trial, i, r.hkl())) < 1) {
                found.add(r.hkl());
            }
        });
        return found;
    }

    /** How far a spacing is off, as measured over tabulated d less 1, over what is allowed. */
    private double spacing(Trial trial, int i, Hkl hkl) {
        return offSpacing(trial, i, hkl) / Math.hypot(tolerance, CLICK_TOLERANCE);
    }

    private static double offSpacing(Trial trial, int i, Hkl hkl) {
        return trial.strengths.reciprocal().vector(hkl).norm()
                        / trial.places.get(i).norm()
                - 1;
    }

    private static double offAngle(Trial trial, int i, List<Hkl> chosen) {
        double measured = Math.abs(Math.atan2(
                trial.places.get(0).cross(trial.places.get(i)),
                trial.places.get(0).dot(trial.places.get(i))));
        return measured - trial.strengths.reciprocal().angle(chosen.get(0), chosen.get(i));
    }

    /** Whether the last of the reflections suits its own spacing and, with those before, ratio, angle and zone. */
    private boolean suits(Trial trial, List<Hkl> chosen) {
        int last = chosen.size() - 1;
        Hkl hkl = chosen.get(last);
        if (hkl.isZero() || Math.abs(spacing(trial, last, hkl)) >= 1) {
            return false;
        }
        for (int i = 0; i < last; i++) {
            double ratio = Math.log((1 + offSpacing(trial, last, hkl)) / (1 + offSpacing(trial, i, chosen.get(i))));
            if (Math.abs(ratio) > CLICK_TOLERANCE * Math.sqrt(2)) {
                return false;
            }
        }
        if (last > 0 && Math.abs(offAngle(trial, last, chosen)) > ANGLE_TOLERANCE) {
            return false;
        }
        return isOneZone(trial, chosen);
    }

    private static boolean isOneZone(Trial trial, List<Hkl> chosen) {
        int second = second(trial, chosen.size());
        if (second < 0) {
            return true;
        }
        Hkl a = chosen.get(0);
        Hkl b = chosen.get(second);
        if (isParallel(a, b)) {
            return false;
        }
        Uvw zone = towardsSource(trial, second, a.zoneWith(b));
        ReciprocalLattice reciprocal = trial.strengths.reciprocal();
        // In the plane, each spot has to lie on the same side of the first as its reflection does.
        return IntStream.range(1, chosen.size()).allMatch(i -> {
            Hkl c = chosen.get(i);
            double side = reciprocal
                    .vector(a)
                    .cross(reciprocal.vector(c))
                    .dot(trial.strengths.lattice().vector(zone));
            double measured = trial.places.get(0).cross(trial.places.get(i));
            boolean beside = Math.abs(measured)
                    > ONE_ROW * trial.places.get(0).norm() * trial.places.get(i).norm();
            return c.dot(zone) == 0 && (!beside || side * measured > 0);
        });
    }

    /** The first spot that is not on the first one's row; −1 when none of the first few is. */
    private static int second(Trial trial, int size) {
        Vector2 a = trial.places.get(0);
        return IntStream.range(1, size)
                .filter(i -> Math.abs(a.cross(trial.places.get(i)))
                        > ONE_ROW * a.norm() * trial.places.get(i).norm())
                .findFirst()
                .orElse(-1);
    }

    private static boolean isParallel(Hkl a, Hkl b) {
        return a.h() * b.k() == a.k() * b.h() && a.k() * b.l() == a.l() * b.k() && a.h() * b.l() == a.l() * b.h();
    }

    private static Uvw towardsSource(Trial trial, int second, Uvw zone) {
        return trial.places.get(0).cross(trial.places.get(second)) > 0 ? zone : zone.negate();
    }

    private HandAnswer answer(Trial trial, List<Hkl> chosen) {
        int second = second(trial, chosen.size());
        Uvw zone = towardsSource(trial, second, chosen.get(0).zoneWith(chosen.get(second)));
        ZoneSetting raw = ZoneSetting.onZone(zone, chosen.get(0), 0);
        Rotation atZero = raw.orientation(trial.crystal.lattice()).rotation();
        Vector2 mean = Vector2.ZERO;
        List<Double> spacings = new ArrayList<>();
        List<Double> angles = new ArrayList<>();
        double squares = 0;
        for (int i = 0; i < chosen.size(); i++) {
            var g = atZero.apply(trial.strengths.reciprocal().vector(chosen.get(i)));
            Vector2 p = trial.places.get(i);
            double turn = p.azimuth() - new Vector2(g.x(), g.y()).azimuth();
            mean = mean.plus(Vector2.ofPolar(p.norm(), turn));
            spacings.add(100 * offSpacing(trial, i, chosen.get(i)));
            squares += Math.pow(spacing(trial, i, chosen.get(i)), 2);
            if (i > 0) {
                double off = offAngle(trial, i, chosen);
                angles.add(Math.toDegrees(off));
                squares += Math.pow(off / ANGLE_TOLERANCE, 2);
            }
        }
        Placement placement =
                new Placement(trial.crystal, beam, ZoneSetting.onZone(zone, chosen.get(0), mean.azimuth()), camera);
        double misfit = Math.sqrt(squares / (2 * chosen.size() - 1));
        return new HandAnswer(placement, chosen, spacings, angles, misfit, HalfTurn.of(placement));
    }

    private static List<HandAnswer> different(List<HandAnswer> sorted) {
        List<HandAnswer> kept = new ArrayList<>();
        for (HandAnswer a : sorted) {
            if (kept.size() == MOST_ANSWERS) {
                break;
            }
            if (kept.stream().noneMatch(k -> isSame(k, a))) {
                kept.add(a);
            }
        }
        return kept;
    }

    private static boolean isSame(HandAnswer a, HandAnswer b) {
        if (!a.placement().crystal().equals(b.placement().crystal())) {
            return false;
        }
        return HalfTurn.isSame(a.placement(), b.placement(), SAME_ORIENTATION);
    }
}
