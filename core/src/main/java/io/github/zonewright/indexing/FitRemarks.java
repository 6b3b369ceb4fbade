package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.orientation.ZoneSetting;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * What a person should know of the uncertainties of a fit: which quantities the spots do not tell apart. That camera
 * constant and cell, or ellipse and axial ratios, enter by their product alone is exact; whether ellipse and lean go together
 * is read from the covariance.
 */
final class FitRemarks {

    /** Correlations above this are told. */
    private static final double STRONG = 0.9;

    /** A lean that is surer than this needs no word, in radians. */
    private static final double SURE_LEAN = Math.toRadians(0.5);

    /** What is held to better than this, relatively, is no matter of the fit. */
    private static final double HELD = 1e-5;

    /** Leans that differ by less are one answer, in radians. */
    private static final double OTHER_LEAN = Math.toRadians(1.2);

    private FitRemarks() {}

    /**
     * The sentences.
     *
     * @param prior what was known beforehand
     * @param errors the standard uncertainties
     * @param constant camera constant in px·Å
     * @param lean the lean in radians
     * @param leanEllipse correlation of the lean along its direction with the ellipse along it
     * @param ellipseError standard uncertainty of the ellipse's ratio
     */
    static List<String> of(
            NetFit.Prior prior,
            SolutionErrors errors,
            double constant,
            Vector2 lean,
            double leanEllipse,
            double ellipseError) {
        List<String> remarks = new ArrayList<>();
        double leanError = Math.max(errors.leanX(), errors.leanY());
        if (leanError > SURE_LEAN) {
            remarks.add(String.format(
                    Locale.ROOT,
                    "The lean of %.1f degrees is uncertain: it is known to %.1f degrees only.",
                    Math.toDegrees(lean.norm()),
                    Math.toDegrees(leanError)));
        }
        if (Math.abs(leanEllipse) > STRONG) {
            remarks.add(String.format(
                    Locale.ROOT,
                    "Lean and ellipse are not told apart by these spots (correlation %.2f): hold the ellipse from a"
                            + " calibration.",
                    leanEllipse));
        }
        if (prior.logConstantError() > HELD) {
            remarks.add(String.format(
                    Locale.ROOT,
                    "Camera constant and size of the cell are not told apart: the constant, known to %.2g %%, is as good as the"
                            + " cell.",
                    100 * errors.constant() / constant));
        }
        if (prior.ellipseError() > HELD) {
            remarks.add(String.format(
                    Locale.ROOT,
                    "Ellipse and axial ratios of the cell are not told apart: the ellipse, known to %.2g %%, is as good as the"
                            + " cell.",
                    100 * ellipseError));
        }
        return List.copyOf(remarks);
    }

    /** That the orientation half a turn about the zone axis away asks for another lean (radians), where it does. */
    static Optional<String> ofHalfTurn(ZoneSetting own, Vector2 lean) {
        double apart = Math.hypot(lean.x() - own.leanX(), lean.y() - own.leanY());
        return apart < OTHER_LEAN
                ? Optional.empty()
                : Optional.of(String.format(
                        Locale.ROOT,
                        "The crystal may lean another way: half a turn about the zone axis goes with a lean of %.1f degrees to"
                                + " the right and %.1f upwards, in place of %.1f and %.1f.",
                        Math.toDegrees(lean.x()),
                        Math.toDegrees(lean.y()),
                        Math.toDegrees(own.leanX()),
                        Math.toDegrees(own.leanY())));
    }
}
