package io.github.zonewright.calibration;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.spots.MeasuredValue;
import java.time.LocalDate;
import java.time.temporal.ChronoUnit;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * A calibration that the user keeps, for images taken at the same setting.
 *
 * <p>A pixel of binning b is b times as large, so that K in px·Å goes as 1/b: K = 1000 px·Å at binning 1 is 500 px·Å at
 * binning 2. Angles and the ellipse stay.
 *
 * @param name the user's name for it, not blank
 * @param setting the microscope's setting
 * @param date the day it was made
 * @param standard name of the standard it was made with; blank when it is known otherwise
 * @param constant camera constant K in px·Å, at the setting's binning
 * @param ellipseRatio long axis over short axis
 * @param ellipseAzimuth azimuth of the long axis in radians, microscope frame
 * @param mirrored whether images are mirrored left to right
 * @param imageRotation angle in radians from the image to the pattern, counter-clockwise in the microscope frame; empty when
 *     not known
 */
public record Calibration(
        String name,
        MicroscopeSetting setting,
        LocalDate date,
        String standard,
        MeasuredValue constant,
        MeasuredValue ellipseRatio,
        MeasuredValue ellipseAzimuth,
        boolean mirrored,
        Optional<MeasuredValue> imageRotation) {

    /** Age in days beyond which a calibration counts as old where the caller does not say; a choice of ours. */
    public static final int OLD_AFTER_DAYS = 90;

    /** Standard uncertainties within which the constant is trusted. */
    private static final double SURE = 2.5;

    /** Lens currents and the height of the specimen repeat no better than to this part; a choice of ours. */
    private static final double REPEATED = 0.005;

    /** Voltages that differ by less than this part are the same. */
    private static final double SAME_VOLTAGE = 0.001;

    private static final double SAME_LENGTH = 0.001;

    /**
     * Checks the values.
     *
     * @throws IllegalArgumentException if the name is blank, the constant not above 0, or the ratio not between 1 and 2
     */
    public Calibration {
        if (name.isBlank()) {
            throw new IllegalArgumentException("name of the calibration: blank, expected a name");
        }
        // The camera checks its own values.
        new Camera(new PixelPoint(0, 0), constant.value(), ellipseRatio.value(), ellipseAzimuth.value(), mirrored);
    }

    /**
     * The calibration that rings gave.
     *
     * @param name the user's name for it
     * @param setting the microscope's setting; its voltage must be that of the fit
     * @param date the day
     * @param fitted the fit
     * @return the calibration, of no image rotation yet
     * @throws IllegalArgumentException if the name is blank or the voltages differ
     */
    public static Calibration of(
            String name, MicroscopeSetting setting, LocalDate date, RingCalibration.Fitted fitted) {
        if (setting.kilovolts() != fitted.beam().kilovolts()) {
            throw new IllegalArgumentException("accelerating voltage: " + setting.kilovolts()
                    + " kV, expected that of the fit, " + fitted.beam().kilovolts() + " kV");
        }
        Camera camera = fitted.camera();
        return new Calibration(
                name,
                setting,
                date,
                fitted.standard().name(),
                fitted.constant(),
                new MeasuredValue(camera.ellipseRatio(), fitted.shape().ratioError()),
                new MeasuredValue(camera.ellipseAzimuth(), fitted.shape().azimuthError()),
                camera.mirrored(),
                Optional.empty());
    }

    /**
     * The direction on the micrograph that a direction of the pattern has. Worked number: with an image rotation of 30° what
     * stands at 45° in the pattern stands at 15° in the micrograph.
     *
     * @param azimuth azimuth in the pattern in radians, counter-clockwise in the microscope frame
     * @return azimuth in the micrograph in radians, −π to π; empty when the image rotation is not known
     */
    public Optional<Double> azimuthInImage(double azimuth) {
        return imageRotation.map(r -> Math.IEEEremainder(azimuth - r.value(), 2 * Math.PI));
    }

    /**
     * The same calibration with the rotation between image and pattern.
     *
     * @param rotation the angle in radians
     * @return the calibration
     */
    public Calibration withImageRotation(MeasuredValue rotation) {
        return new Calibration(
                name, setting, date, standard, constant, ellipseRatio, ellipseAzimuth, mirrored, Optional.of(rotation));
    }

    /**
     * The same calibration under another name.
     *
     * @param other the user's name for it
     * @return the calibration
     * @throws IllegalArgumentException if the name is blank
     */
    public Calibration withName(String other) {
        return new Calibration(
                other, setting, date, standard, constant, ellipseRatio, ellipseAzimuth, mirrored, imageRotation);
    }

    /**
     * The same calibration for images of another binning.
     *
     * @param binning pixels joined to one along each side
     * @return the calibration
     * @throws IllegalArgumentException if the binning is below 1
     */
    public Calibration forBinning(int binning) {
        MicroscopeSetting other = setting.withBinning(binning);
        MeasuredValue scaled =
                binning == setting.binning() ? constant : constant.times((double) setting.binning() / binning);
        return new Calibration(
                name, other, date, standard, scaled, ellipseRatio, ellipseAzimuth, mirrored, imageRotation);
    }

    /**
     * How far the camera constant of another image may be off.
     *
     * @return part of it, such as 0.005: 2.5 standard uncertainties, and half a per cent at least, since lens currents and the
     *     height of the specimen repeat no better from one image to the next
     */
    public double tolerance() {
        return Math.max(REPEATED, SURE * constant.relativeError());
    }

    /**
     * The camera of an image.
     *
     * @param centre where the direct beam meets it
     * @return the camera, for the setting's binning
     */
    public Camera camera(PixelPoint centre) {
        return new Camera(centre, constant.value(), ellipseRatio.value(), ellipseAzimuth.value(), mirrored);
    }

    /**
     * What speaks against using it for an image.
     *
     * @param image setting at which the image was taken
     * @param today the day of use
     * @param oldAfterDays age in days beyond which a calibration counts as old
     * @return sentences for the user; empty when nothing does. Another binning is no warning: see {@link #forBinning}
     */
    public List<String> warnings(MicroscopeSetting image, LocalDate today, int oldAfterDays) {
        List<String> warnings = new ArrayList<>();
        long age = ChronoUnit.DAYS.between(date, today);
        if (age > oldAfterDays) {
            warnings.add("The calibration '" + name + "' is " + age + " days old; " + oldAfterDays
                    + " days are taken as the limit.");
        } else if (age < 0) {
            warnings.add("The calibration '" + name + "' is dated " + date + ", after the day of use.");
        }
        if (differ(setting.kilovolts(), image.kilovolts(), SAME_VOLTAGE)) {
            warnings.add(text("It is for %s kV, the image is of %s kV.", setting.kilovolts(), image.kilovolts()));
        }
        if (setting.cameraLength().isPresent() && image.cameraLength().isPresent()) {
            double own = setting.cameraLength().getAsDouble();
            double other = image.cameraLength().getAsDouble();
            if (differ(own, other, SAME_LENGTH)) {
                warnings.add(text("It is for the camera length %s mm, the image is of %s mm.", own, other));
            }
        }
        if (setting.pixelSize().isPresent() && image.pixelSize().isPresent()) {
            double own = setting.pixelSize().getAsDouble();
            double other = image.pixelSize().getAsDouble();
            if (differ(own, other, SAME_LENGTH)) {
                warnings.add(text("It is for pixels of %s µm, the image has pixels of %s µm.", own, other));
            }
        }
        String own = setting.instrument().strip();
        String other = image.instrument().strip();
        if (!own.isEmpty() && !other.isEmpty() && !own.equalsIgnoreCase(other)) {
            warnings.add("It is for the instrument '" + own + "', the image is of '" + other + "'.");
        }
        return List.copyOf(warnings);
    }

    private static boolean differ(double one, double other, double tolerance) {
        return Math.abs(one - other) > tolerance * one;
    }

    private static String text(String format, double own, double other) {
        return String.format(Locale.ROOT, format, plain(own), plain(other));
    }

    private static String plain(double value) {
        return value == Math.rint(value) ? Long.toString((long) value) : Double.toString(value);
    }
}
