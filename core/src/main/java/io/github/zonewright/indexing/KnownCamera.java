package io.github.zonewright.indexing;

import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.spots.PatternCentre;
import java.util.Optional;

/**
 * What is known of the camera before a search: told by the user, taken from a calibration, or from another solution in the
 * same image, such as a matrix or a substrate whose cell is sure.
 *
 * @param constant camera constant in px·Å
 * @param tolerance how far it may be off, as a share of it; 0 holds it as it is
 * @param mirrored whether the image is mirrored left to right
 * @param ellipseRatio long axis over short axis; 1 where nothing is known
 * @param ellipseAzimuth azimuth of the long axis in radians, microscope frame
 * @param ellipseError standard uncertainty of the ratio; 0 holds the ellipse as it is; empty when nothing is known of it, and
 *     then it may differ from 1 by about as much as the constant may be off
 * @param centre where the direct beam meets the image; empty to have it found
 */
public record KnownCamera(
        double constant,
        double tolerance,
        boolean mirrored,
        double ellipseRatio,
        double ellipseAzimuth,
        Optional<Double> ellipseError,
        Optional<PatternCentre> centre) {

    /** What is held is held to this share, well below what positions tell. */
    private static final double HELD = 1e-6;

    /** Standard uncertainty of the constant as a share of the tolerance, which few surpass. */
    private static final double CONSTANT_ERROR = 0.6;

    private static final double LARGEST_TOLERANCE = 0.2;
    private static final double LARGEST_RATIO = 1.2;

    /** Calibrations and other solutions are trusted within so many of their standard uncertainties. */
    private static final double SURE = 2.5;

    /**
     * Checks the values.
     *
     * @throws IllegalArgumentException if one is out of range
     */
    public KnownCamera {
        if (!(constant > 0 && constant < 1e9)) {
            throw new IllegalArgumentException(
                    "camera constant: " + constant + " px·Å, expected above 0 and below 1e9 px·Å");
        }
        if (!(tolerance >= 0 && tolerance <= LARGEST_TOLERANCE)) {
            throw new IllegalArgumentException(
                    "tolerance of the camera constant: " + tolerance + ", expected a share from 0 to 0.2");
        }
        if (!(ellipseRatio >= 1 && ellipseRatio <= LARGEST_RATIO)) {
            throw new IllegalArgumentException(
                    "ratio of the ellipse: " + ellipseRatio + ", expected long axis over short axis from 1 to 1.2");
        }
        if (!Double.isFinite(ellipseAzimuth)) {
            throw new IllegalArgumentException(
                    "azimuth of the ellipse: " + ellipseAzimuth + ", expected a finite angle in radians");
        }
        if (ellipseError.isPresent() && !(ellipseError.get() >= 0 && ellipseError.get() <= LARGEST_TOLERANCE)) {
            throw new IllegalArgumentException(
                    "uncertainty of the ellipse's ratio: " + ellipseError.get() + ", expected 0 to 0.2");
        }
    }

    /**
     * A camera of which the constant is known.
     *
     * @param constant camera constant in px·Å
     * @param tolerance how far it may be off, as a share of it, 0 to 0.2; 0 holds it
     * @param mirrored whether the image is mirrored left to right
     * @return the camera, its ellipse and centre unknown
     * @throws IllegalArgumentException if constant or tolerance is out of range
     */
    public static KnownCamera of(double constant, double tolerance, boolean mirrored) {
        return new KnownCamera(constant, tolerance, mirrored, 1, 0, Optional.empty(), Optional.empty());
    }

    /**
     * The camera that a calibration gives, with its uncertainties.
     *
     * @param calibration the calibration, at the image's binning
     * @return the camera, its centre unknown
     * @throws IllegalArgumentException if the calibration is uncertain by more than a fifth
     */
    public static KnownCamera of(Calibration calibration) {
        double half = (calibration.ellipseRatio().value() - 1) / 2;
        double along = calibration.ellipseRatio().error();
        double across =
                4 * half * Math.min(Math.PI / 4, calibration.ellipseAzimuth().error());
        return of(calibration.constant().value(), SURE * calibration.constant().relativeError(), calibration.mirrored())
                .withEllipse(
                        calibration.ellipseRatio().value(),
                        calibration.ellipseAzimuth().value(),
                        Math.min(LARGEST_TOLERANCE, Math.hypot(along, across)));
    }

    /**
     * The camera that another solution in the same image gives, as an internal standard: its constant within the
     * solution's uncertainty, its ellipse and its centre.
     *
     * @param standard the solution whose crystal's cell is sure
     * @return the camera
     * @throws IllegalArgumentException if the solution's camera constant is uncertain by more than a fifth
     */
    public static KnownCamera of(Solution standard) {
        Camera camera = standard.placement().camera();
        SolutionErrors errors = standard.errors();
        double centreError = Math.max(0.05, Math.hypot(errors.centreX(), errors.centreY()));
        return of(camera.constant(), SURE * errors.constant() / camera.constant(), camera.mirrored())
                .withEllipse(camera.ellipseRatio(), camera.ellipseAzimuth(), 2 * errors.constant() / camera.constant())
                .withCentre(camera.centre(), centreError);
    }

    /**
     * The same with an ellipse.
     *
     * @param ratio long axis over short axis, 1 to 1.2
     * @param azimuth azimuth of the long axis in radians, microscope frame
     * @param ratioError standard uncertainty of the ratio, 0 to 0.2; 0 holds the ellipse
     * @return the changed camera
     * @throws IllegalArgumentException if a value is out of range
     */
    public KnownCamera withEllipse(double ratio, double azimuth, double ratioError) {
        return new KnownCamera(constant, tolerance, mirrored, ratio, azimuth, Optional.of(ratioError), centre);
    }

    /**
     * The same with the centre given, for example clicked by a person.
     *
     * @param place where the direct beam meets the image
     * @param error standard uncertainty of each coordinate in px, above 0
     * @return the changed camera
     * @throws IllegalArgumentException if the error is not positive and finite
     */
    public KnownCamera withCentre(PixelPoint place, double error) {
        PatternCentre given = new PatternCentre(place, error, PatternCentre.Source.DIRECT_BEAM);
        return new KnownCamera(
                constant, tolerance, mirrored, ellipseRatio, ellipseAzimuth, ellipseError, Optional.of(given));
    }

    /** Standard uncertainty of the camera constant as a share of it. */
    double constantError() {
        return CONSTANT_ERROR * tolerance;
    }

    /** What a fit knows beforehand about a centre in the microscope frame. */
    NetFit.Prior prior(Vector2 at, double centreError) {
        double e = (ellipseRatio - 1) / (ellipseRatio + 1);
        double expected = Math.max(0.0025, Math.min(0.015, 0.4 * tolerance));
        return NetFit.Prior.ofCamera(
                at.x(),
                at.y(),
                centreError,
                Math.log(constant / Math.sqrt(1 - e * e)),
                Math.max(HELD, constantError()),
                e * Math.cos(2 * ellipseAzimuth),
                e * Math.sin(2 * ellipseAzimuth),
                ellipseError.map(error -> Math.max(HELD, error / 2)).orElse(expected));
    }

    /** A pose of this camera about a centre in the microscope frame. */
    NetPose pose(Vector2 at, double rotation) {
        NetFit.Prior known = prior(at, 1);
        return new NetPose(at.x(), at.y(), Math.exp(known.logConstant()), rotation, known.e1(), known.e2());
    }
}
