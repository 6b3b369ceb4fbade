package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import ij.Prefs;
import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.KnownCamera;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.pattern.Placement;
import java.time.LocalDate;
import java.util.List;
import java.util.Optional;

/**
 * What a person says of the instrument.
 *
 * @param kilovolts accelerating voltage in kV
 * @param kind how the scale is given
 * @param scale its value in the unit of the kind
 * @param pixelMicrometres pixel size in µm
 * @param binning pixels joined to one along each side
 * @param tolerancePercent how far the scale may be off, in %
 * @param mirrored whether the image is mirrored
 * @param applied the calibration in use; there is one when the scale is given by it
 */
public record Instrument(
        double kilovolts,
        ScaleKind kind,
        double scale,
        double pixelMicrometres,
        int binning,
        double tolerancePercent,
        boolean mirrored,
        Optional<AppliedCalibration> applied) {
    private static final String KEY = "zonewright.";
    private static final String INSTRUMENT = "zonewright.instrument";
    private static final String CRYSTAL = "zonewright.crystal";
    private static final String CALIBRATION = KEY + "calibration";
    private static final double PERCENT = 100;
    private static final double LARGEST_TOLERANCE = 20;
    private static final Instrument FIRST = new Instrument(200, ScaleKind.PIXELS, 500, 14, 1, 3, false);

    /** The calibration used last, which need not be kept in a file. */
    private static volatile Optional<AppliedCalibration> lastApplied = Optional.empty();

    /**
     * Checks that a scale by calibration has one.
     *
     * @throws IllegalArgumentException if it has none
     */
    public Instrument {
        if (kind == ScaleKind.CALIBRATION && applied.isEmpty()) {
            throw new IllegalArgumentException("scale: no calibration is in use for this image; choose one first");
        }
    }

    /**
     * An instrument without a calibration in use.
     *
     * @param kilovolts accelerating voltage in kV
     * @param kind how the scale is given
     * @param scale its value in the unit of the kind
     * @param pixelMicrometres pixel size in µm
     * @param binning pixels joined to one along each side
     * @param tolerancePercent how far the scale may be off, in %
     * @param mirrored whether the image is mirrored
     */
    public Instrument(
            double kilovolts,
            ScaleKind kind,
            double scale,
            double pixelMicrometres,
            int binning,
            double tolerancePercent,
            boolean mirrored) {
        this(kilovolts, kind, scale, pixelMicrometres, binning, tolerancePercent, mirrored, Optional.empty());
    }

    /**
     * What the dialog of a command says of the instrument. Where the scale is that of the calibration in use, binning,
     * tolerance and mirror are as they were when it was applied to the image.
     *
     * @param said what the dialog says, in the ways other than by calibration
     * @param kind the way
     * @param image the image; read for the calibration in use alone; null where there is none, for that in use last
     * @return the instrument
     * @throws IllegalArgumentException if the scale is to be that of a calibration and none is in use
     */
    public static Instrument told(Instrument said, ScaleKind kind, ImagePlus image) {
        if (kind != ScaleKind.CALIBRATION) {
            return said.withKind(kind);
        }
        Instrument kept = (image == null ? Optional.of(last()) : of(image))
                .filter(i -> i.applied.isPresent())
                .orElseThrow(() -> new IllegalArgumentException("scale: no calibration is in use for this image; call"
                        + " Apply Calibration... or Calibrate from Rings... first"));
        return new Instrument(
                said.kilovolts,
                kind,
                said.scale,
                said.pixelMicrometres,
                kept.binning,
                kept.tolerancePercent,
                kept.mirrored,
                kept.applied);
    }

    /**
     * The one used last, under the same preferences as the commands' dialogs.
     *
     * @return the instrument
     */
    public static Instrument last() {
        try {
            ScaleKind kind = ScaleKind.ofLabel(Prefs.get(KEY + "scalekind", FIRST.kind.label()));
            Optional<AppliedCalibration> calibration = lastCalibration();
            return new Instrument(
                    Prefs.get(KEY + "kilovolts", FIRST.kilovolts),
                    kind == ScaleKind.CALIBRATION && calibration.isEmpty() ? ScaleKind.PIXELS : kind,
                    Prefs.get(KEY + "scale", FIRST.scale),
                    Prefs.get(KEY + "pixelsize", FIRST.pixelMicrometres),
                    (int) Prefs.get(KEY + "binning", FIRST.binning),
                    Prefs.get(KEY + "tolerance", FIRST.tolerancePercent),
                    Prefs.get(KEY + "mirrored", false),
                    kind == ScaleKind.CALIBRATION ? calibration : Optional.empty());
        } catch (IllegalArgumentException e) {
            return FIRST;
        }
    }

    private static Optional<AppliedCalibration> lastCalibration() {
        String name = Prefs.get(CALIBRATION, "");
        return lastApplied
                .filter(a -> a.calibration().name().equals(name))
                .or(() -> KeptCalibrations.named(name).map(AppliedCalibration::of));
    }

    /**
     * What was said for an image before, or that of the pattern that lies on it.
     *
     * @param image the image
     * @return the instrument, or empty for an image new to us
     */
    public static Optional<Instrument> of(ImagePlus image) {
        return keptWith(image).or(() -> Sitting.of(image).placement().map(Instrument::of));
    }

    /**
     * What was said for an image before.
     *
     * @param image the image
     * @return the instrument, or empty where nothing was said, whatever pattern lies on it
     */
    public static Optional<Instrument> keptWith(ImagePlus image) {
        return Optional.ofNullable((Instrument) image.getProperty(INSTRUMENT));
    }

    /**
     * The instrument of a pattern, with what the pattern does not tell as it was used last.
     *
     * @param placement the pattern
     * @return the instrument, its scale in px·Å
     */
    public static Instrument of(Placement placement) {
        Instrument last = last();
        return new Instrument(
                placement.beam().kilovolts(),
                ScaleKind.PIXELS,
                placement.camera().constant(),
                last.pixelMicrometres,
                last.binning,
                last.tolerancePercent,
                placement.camera().mirrored());
    }

    /**
     * The crystal that was named for an image before, or that of the pattern that lies on it.
     *
     * @param image the image
     * @return the crystal, or empty for an image new to us
     */
    public static Optional<Crystal> crystalOf(ImagePlus image) {
        return Optional.ofNullable((Crystal) image.getProperty(CRYSTAL))
                .or(() -> Sitting.of(image).placement().map(Placement::crystal));
    }

    /**
     * Keeps with an image what was said for it; nothing of it is saved in the image's file.
     *
     * @param image the image
     * @param crystal the crystal named for it
     */
    public void keepWith(ImagePlus image, Crystal crystal) {
        keepWith(image);
        image.setProperty(CRYSTAL, crystal);
    }

    /**
     * The same where no crystal is named.
     *
     * @param image the image
     */
    public void keepWith(ImagePlus image) {
        image.setProperty(INSTRUMENT, this);
    }

    /** Makes it the one used last. */
    public void remember() {
        Prefs.set(KEY + "kilovolts", kilovolts);
        Prefs.set(KEY + "scalekind", kind.label());
        Prefs.set(KEY + "scale", scale);
        Prefs.set(KEY + "pixelsize", pixelMicrometres);
        Prefs.set(KEY + "binning", binning);
        Prefs.set(KEY + "tolerance", tolerancePercent);
        Prefs.set(KEY + "mirrored", mirrored);
        lastApplied = applied.map(a -> AppliedCalibration.of(a.calibration()));
        Prefs.set(CALIBRATION, applied.map(a -> a.calibration().name()).orElse(""));
    }

    /**
     * Whether anybody has ever said something of the instrument on this computer.
     *
     * @return false on a first run
     */
    public static boolean isRemembered() {
        return !Prefs.get(KEY + "scalekind", "").isEmpty();
    }

    /**
     * The beam.
     *
     * @return the beam of the voltage
     */
    public Beam beam() {
        return Beam.ofKilovolts(kilovolts);
    }

    /**
     * The camera constant.
     *
     * @param image read for its calibration, if the scale is taken from it; may be null otherwise
     * @return the camera constant in px·Å
     * @throws IllegalArgumentException if it does not follow from the values; the message says why
     */
    public double cameraConstant(ImagePlus image) {
        if (kind == ScaleKind.CALIBRATION) {
            return calibration().orElseThrow().constant().value();
        }
        return kind.cameraConstant(scale, pixelMicrometres, binning, beam(), image);
    }

    /**
     * The calibration that gives the scale.
     *
     * @return the calibration at the image's binning; empty when the scale is given in another way
     */
    public Optional<Calibration> calibration() {
        return kind == ScaleKind.CALIBRATION ? applied.map(a -> a.calibration().forBinning(binning)) : Optional.empty();
    }

    /**
     * The camera, with the ellipse of the calibration where that gives the scale.
     *
     * @param centre where the direct beam meets the image
     * @param image read for its calibration, if the scale is taken from it; may be null otherwise
     * @return the camera
     * @throws IllegalArgumentException if no camera constant follows from the values; the message says why
     */
    public Camera camera(PixelPoint centre, ImagePlus image) {
        Camera plain = Camera.of(centre, cameraConstant(image), mirrored);
        return calibration()
                .map(c -> plain.withEllipse(
                        c.ellipseRatio().value(), c.ellipseAzimuth().value()))
                .orElse(plain);
    }

    /**
     * What is known of the camera before a search: where a calibration gives the scale, its ellipse too.
     *
     * @param image read for its calibration, if the scale is taken from it; may be null otherwise
     * @return the camera, its centre unknown
     * @throws IllegalArgumentException if no camera constant follows from the values, or the tolerance is above 20 %
     */
    public KnownCamera knownCamera(ImagePlus image) {
        KnownCamera plain = KnownCamera.of(cameraConstant(image), tolerancePercent / PERCENT, mirrored);
        return calibration()
                .map(KnownCamera::of)
                .map(c -> plain.withEllipse(
                        c.ellipseRatio(), c.ellipseAzimuth(), c.ellipseError().orElseThrow()))
                .orElse(plain);
    }

    /**
     * The same with a calibration in use, which gives scale, tolerance and mirror.
     *
     * @param use the calibration
     * @param imageBinning binning of the image
     * @return the changed instrument; the voltage stays what it was
     */
    public Instrument with(AppliedCalibration use, int imageBinning) {
        Calibration here = use.calibration().forBinning(imageBinning);
        return new Instrument(
                kilovolts,
                ScaleKind.CALIBRATION,
                here.constant().value(),
                pixelMicrometres,
                imageBinning,
                Math.min(LARGEST_TOLERANCE, PERCENT * here.tolerance()),
                here.mirrored(),
                Optional.of(use));
    }

    /**
     * What speaks against the calibration in use.
     *
     * @param today the day of use
     * @return sentences for a person; empty when nothing does, or none gives the scale
     */
    public List<String> warnings(LocalDate today) {
        return kind == ScaleKind.CALIBRATION
                ? applied.map(a -> a.warnings(kilovolts, binning, today)).orElse(List.of())
                : List.of();
    }

    /**
     * The same with the scale given in another way.
     *
     * @param other the way
     * @return the changed instrument
     */
    public Instrument withKind(ScaleKind other) {
        return new Instrument(kilovolts, other, scale, pixelMicrometres, binning, tolerancePercent, mirrored, applied);
    }

    /**
     * The same with another scale, in px·Å.
     *
     * @param constant camera constant in px·Å
     * @return the changed instrument
     */
    public Instrument withConstant(double constant) {
        return new Instrument(
                kilovolts, ScaleKind.PIXELS, constant, pixelMicrometres, binning, tolerancePercent, mirrored, applied);
    }

    /**
     * The same at another voltage.
     *
     * @param other accelerating voltage in kV
     * @return the changed instrument
     */
    public Instrument withKilovolts(double other) {
        return new Instrument(other, kind, scale, pixelMicrometres, binning, tolerancePercent, mirrored, applied);
    }
}
