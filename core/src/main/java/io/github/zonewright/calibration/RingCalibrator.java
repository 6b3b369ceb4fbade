package io.github.zonewright.calibration;

import io.github.zonewright.calibration.RingCalibration.Fitted;
import io.github.zonewright.calibration.RingCalibration.Refused;
import io.github.zonewright.calibration.RingCalibration.StandardRank;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.Ellipse;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.spots.MeasuredValue;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;

/**
 * Turns rings of a known powder into a camera: R = (K/λ)·tan 2θ with λ = 2d sin θ gives the camera constant K, the shape of
 * the rings gives centre and ellipse. Instances are immutable.
 *
 * <p>Known limit: rings give ratios of spacings, so standards of one structure type and different cell explain the same rings
 * equally well with different constants. {@link #withConstantNear} tells them apart where the camera length is known to a few
 * per cent.
 */
public final class RingCalibrator {

    /** Rings needed: the constant, the ellipse's ratio and its azimuth are three unknowns. */
    public static final int FEWEST_RINGS = 3;

    private static final double EXPLAINED = 0.7;
    private static final double EXPLAINED_LIGHT = 0.85;
    /** A line so strong, relative to the strongest, must not be missing. */
    private static final double STRONG = 0.3;

    private static final double LARGEST_RESIDUAL = 0.003;
    private static final double CLEARLY_BETTER = 4;

    private final Beam beam;
    private final boolean mirrored;
    private final double smallest;
    private final double largest;
    private final List<Crystal> others;

    private RingCalibrator(Beam beam, boolean mirrored, double smallest, double largest, List<Crystal> others) {
        this.beam = beam;
        this.mirrored = mirrored;
        this.smallest = smallest;
        this.largest = largest;
        this.others = List.copyOf(others);
    }

    /**
     * A calibrator of images that are not mirrored, with no idea of the constant and no other standards to compare.
     *
     * @param beam the beam
     * @return the calibrator
     */
    public static RingCalibrator of(Beam beam) {
        return new RingCalibrator(beam, false, 0, Double.MAX_VALUE, List.of());
    }

    /**
     * Says whether images are mirrored, which turns the ellipse's azimuth into that of the microscope frame.
     *
     * @param isMirrored whether X points to the left on the image
     * @return a calibrator with that setting
     */
    public RingCalibrator withMirrored(boolean isMirrored) {
        return new RingCalibrator(beam, isMirrored, smallest, largest, others);
    }

    /**
     * Says about where the constant lies.
     *
     * @param constant expected camera constant in px·Å
     * @param relativeTolerance how far off it may be at most, as a part of it, such as 0.05
     * @return a calibrator with that setting
     * @throws IllegalArgumentException if the constant is not above 0 or the tolerance not between 0 and 1
     */
    public RingCalibrator withConstantNear(double constant, double relativeTolerance) {
        if (!(constant > 0) || !(relativeTolerance > 0 && relativeTolerance < 1)) {
            throw new IllegalArgumentException("camera constant " + constant + " px·Å ± part " + relativeTolerance
                    + ": expected a constant above 0 and a part between 0 and 1");
        }
        return new RingCalibrator(
                beam, mirrored, constant * (1 - relativeTolerance), constant * (1 + relativeTolerance), others);
    }

    /**
     * Names other standards that the powder may be.
     *
     * @param standards the crystals to compare with the assumed one
     * @return a calibrator with that setting
     */
    public RingCalibrator comparedWith(List<Crystal> standards) {
        return new RingCalibrator(beam, mirrored, smallest, largest, standards);
    }

    /**
     * Calibrates.
     *
     * @param measured the rings
     * @param standard what they are assumed to be of
     * @return a camera, or a refusal when there are fewer rings than unknowns
     */
    public RingCalibration calibrate(MeasuredRings measured, Crystal standard) {
        int count = measured.rings().size();
        if (count < FEWEST_RINGS || measured.shape().isEmpty()) {
            return new Refused(
                    "Rings found: " + count + ". At least " + FEWEST_RINGS
                            + " are needed for the camera constant, the ellipse and its azimuth.",
                    List.of());
        }
        List<StandardRank> ranks = others.stream()
                .filter(other -> !other.equals(standard))
                .flatMap(other -> match(measured, other).stream())
                .map(m -> rank(m, measured))
                .sorted(Comparator.comparingDouble(StandardRank::score).reversed())
                .toList();
        Optional<RingMatch.Result> match = match(measured, standard);
        int explained = match.map(RingMatch.Result::explained).orElse(0);
        if (explained < FEWEST_RINGS) {
            return new Refused(
                    "Rings that lines of " + standard.name() + " explain: " + explained + " of " + count + ". At least "
                            + FEWEST_RINGS + " are needed.",
                    ranks.stream().filter(StandardRank::fits).toList());
        }
        return fitted(measured, match.get(), ranks);
    }

    /**
     * What a user must know before handling a standard.
     *
     * @param standard the crystal
     * @return sentences; empty when there is nothing to say
     */
    public static List<String> cautions(Crystal standard) {
        boolean thallium = standard.cellContents().containsKey("Tl");
        return thallium
                ? List.of(
                        "Thallium compounds are very toxic: fatal if swallowed or inhaled, and harmful through the skin."
                                + " Handle and discard the specimen accordingly.")
                : List.of();
    }

    private Optional<RingMatch.Result> match(MeasuredRings measured, Crystal crystal) {
        return RingMatch.of(crystal, measured, beam.wavelength(), smallest, largest);
    }

    private StandardRank rank(RingMatch.Result match, MeasuredRings measured) {
        return new StandardRank(
                match.standard(), match.constant(), match.explained(), match.score(), fits(match, measured));
    }

    private boolean fits(RingMatch.Result match, MeasuredRings measured) {
        double squares = 0;
        double light = 0;
        double all = 0;
        for (int i = 0; i < match.lines().length; i++) {
            double height = measured.rings().get(i).height();
            all += height;
            if (match.lines()[i] >= 0) {
                light += height;
                double t = match.table().get(match.lines()[i]).reducedRadius(beam.wavelength());
                double off = measured.rings().get(i).radius().value() / (match.constant() * t) - 1;
                squares += off * off;
            }
        }
        int explained = match.explained();
        return explained >= FEWEST_RINGS
                && light > EXPLAINED_LIGHT * all
                && explained >= EXPLAINED * match.lines().length
                && match.missing().size() <= explained / 4
                && match.missing().stream().noneMatch(line -> line.strength() > STRONG)
                && Math.sqrt(squares / explained) < LARGEST_RESIDUAL;
    }

    private RingCalibration fitted(MeasuredRings measured, RingMatch.Result match, List<StandardRank> ranks) {
        MeasuredValue constant = constant(measured, match);
        List<RingAssignment> assigned = new ArrayList<>();
        List<MeasuredRing> unexplained = new ArrayList<>();
        for (int i = 0; i < match.lines().length; i++) {
            MeasuredRing ring = measured.rings().get(i);
            if (match.lines()[i] >= 0) {
                assigned.add(assignment(ring, match.table().get(match.lines()[i]), constant.value()));
            } else {
                unexplained.add(ring);
            }
        }
        RingShape shape = measured.shape().orElseThrow();
        Ellipse ellipse = shape.ellipse();
        double azimuth = mirrored ? Math.PI - ellipse.azimuth() : ellipse.azimuth();
        Camera camera = new Camera(ellipse.centre(), constant.value(), ellipse.ratio(), azimuth, mirrored);
        boolean fits = fits(match, measured);
        return new Fitted(
                match.standard(),
                beam,
                camera,
                constant,
                shape,
                assigned,
                unexplained,
                match.missing(),
                fits,
                ranks,
                notices(match, fits, ranks));
    }

    /** d from R: 2θ = atan(λR/K), d = λ/(2 sin θ). */
    private RingAssignment assignment(MeasuredRing ring, PowderLine line, double constant) {
        double wavelength = beam.wavelength();
        double r = ring.radius().value();
        double d = wavelength / (2 * Math.sin(Math.atan(wavelength * r / constant) / 2));
        MeasuredValue spacing = new MeasuredValue(d, d * ring.radius().error() / r);
        return new RingAssignment(ring, line, spacing, r - constant * line.reducedRadius(wavelength));
    }

    /** The mean of R/t by weight; its error from the covariance of the radii, more if the rings disagree beyond chance. */
    private MeasuredValue constant(MeasuredRings measured, RingMatch.Result match) {
        int n = match.lines().length;
        double[] weights = new double[n];
        double[] reduced = new double[n];
        double under = 0;
        for (int i = 0; i < n; i++) {
            if (match.lines()[i] >= 0) {
                reduced[i] = match.table().get(match.lines()[i]).reducedRadius(beam.wavelength());
                weights[i] = reduced[i] / measured.radiusCovariance().get(i).get(i);
                under += weights[i] * reduced[i];
            }
        }
        double constant = 0;
        double variance = 0;
        for (int i = 0; i < n; i++) {
            constant += weights[i] / under * measured.rings().get(i).radius().value();
            for (int j = 0; j < n; j++) {
                variance += weights[i]
                        * weights[j]
                        / (under * under)
                        * measured.radiusCovariance().get(i).get(j);
            }
        }
        double squares = 0;
        for (int i = 0; i < n; i++) {
            if (weights[i] > 0) {
                double off = measured.rings().get(i).radius().value() - constant * reduced[i];
                squares += off * off / measured.radiusCovariance().get(i).get(i);
            }
        }
        int freedom = match.explained() - 1;
        double spread = squares / freedom;
        boolean disagree = spread > 1 + 2 * Math.sqrt(2.0 / freedom);
        return new MeasuredValue(constant, Math.sqrt(variance * (disagree ? spread : 1)));
    }

    private static List<String> notices(RingMatch.Result match, boolean fits, List<StandardRank> ranks) {
        List<String> notices = new ArrayList<>();
        String name = match.standard().name();
        if (!fits) {
            notices.add("The rings do not fit " + name + ", which explains " + match.explained() + " of "
                    + match.lines().length + ".");
        }
        if (!match.missing().isEmpty()) {
            List<String> lines = match.missing().stream()
                    .map(line -> line.families().get(0).toString())
                    .toList();
            notices.add("Lines of " + name + " that should show and do not: " + String.join(", ", lines)
                    + ". In a film whose grains lie alike some lines are missing; else it is another substance.");
        }
        List<String> better = names(ranks, r -> r.fits() && r.score() > match.score() + CLEARLY_BETTER);
        if (!better.isEmpty()) {
            notices.add("These standards fit better than " + name + ": " + String.join(", ", better) + ".");
        }
        List<String> alike = names(ranks, r -> r.fits() && Math.abs(r.score() - match.score()) <= CLEARLY_BETTER);
        if (fits && !alike.isEmpty()) {
            notices.add("The rings alone do not tell " + name + " from " + String.join(", ", alike)
                    + "; each gives a camera constant of its own.");
        }
        notices.addAll(cautions(match.standard()));
        return notices;
    }

    private static List<String> names(List<StandardRank> ranks, java.util.function.Predicate<StandardRank> condition) {
        return ranks.stream().filter(condition).map(r -> r.standard().name()).toList();
    }
}
