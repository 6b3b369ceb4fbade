package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.Prefs;
import ij.Undo;
import ij.WindowManager;
import ij.gui.Overlay;
import ij.gui.Roi;
import ij.process.ByteProcessor;
import ij.process.ColorProcessor;
import ij.process.ImageProcessor;
import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.RingPatterns;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.imagej.session.UserFolder;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** The calibration from rings as a macro runs it, with no display. */
class CalibrateRingsTest {
    private static final String RINGS = "command.CalibrateRings";
    private static final String ALUMINIUM = "crystal=aluminium kilovolts=200 ";

    @TempDir
    private Path folder;

    @BeforeEach
    void keepApart() {
        Prefs.set(UserFolder.KEY, folder.toString());
    }

    @AfterEach
    void forgetFolder() {
        Prefs.set(UserFolder.KEY, "");
    }

    @Test
    void aluminium_isMeasured() {
        String answer = answer(RingPatterns.aluminium(), ALUMINIUM + "roughscale=182");
        assertEquals(
                RingPatterns.CONSTANT, number(answer, "camera constant ([\\d.]+) ± "), 0.001 * RingPatterns.CONSTANT);
        assertEquals(RingPatterns.RATIO, number(answer, "ellipse ratio ([\\d.]+) ± "), 0.003);
        assertEquals(RingPatterns.AZIMUTH, number(answer, "on the screen ([\\d.]+) ± "), 2);
        assertEquals(RingPatterns.X, number(answer, "centre x ([\\d.]+) ± "), 0.3);
        assertEquals(RingPatterns.Y, number(answer, ", y ([\\d.]+) ± "), 0.3);
        assertTrue(answer.contains("do not tell Aluminium from Gold;"), answer);
    }

    /** Cell edges: aluminium 4.05 Å, gold 4.08 Å, ceria 5.41 Å; a scale known to 3 % leaves ceria out, and not gold. */
    @Test
    void noRoughScale_namesWhatElseItMayBe() {
        String answer = answer(RingPatterns.aluminium(), ALUMINIUM);
        assertTrue(answer.contains("do not tell Aluminium from Gold, Ceria;"), answer);
    }

    /** On a mirrored image the azimuth on the screen is the same. */
    @Test
    void mirrored_azimuthOnTheScreenStays() {
        String answer = answer(RingPatterns.aluminium(), ALUMINIUM + "mirrored");
        assertEquals(RingPatterns.AZIMUTH, number(answer, "on the screen ([\\d.]+) ± "), 2);
    }

    @Test
    void rings_areNamedMarks_andRemoved() {
        ImagePlus image = RingPatterns.aluminium();
        Roi mine = new Roi(3, 4, 50, 60);
        image.setOverlay(new Overlay(mine));
        Fingerprint before = Fingerprint.of(image);
        assertEquals(Optional.empty(), Launching.macro(image, RINGS, ALUMINIUM + "rings"));
        before.assertSame(image);
        Roi[] marks = image.getOverlay().toArray();
        assertTrue(Arrays.stream(marks).anyMatch(r -> "{1 1 1}".equals(r.getName())));
        int count = PatternOverlay.count(image);
        assertTrue(count >= 10, "marks " + count);
        Launching.macro(image, RINGS, ALUMINIUM + "rings");
        assertEquals(count, PatternOverlay.count(image));
        Launching.macro(image, "command.RemoveMarks", "");
        assertEquals(0, PatternOverlay.count(image));
        before.assertSame(image);
    }

    @Test
    void imagejUndo_takesTheRingsOff() {
        ImagePlus image = RingPatterns.aluminium();
        image.setOverlay(new Overlay(new Roi(3, 4, 50, 60)));
        Launching.macro(image, RINGS, ALUMINIUM + "rings");
        assertTrue(PatternOverlay.count(image) > 0);
        WindowManager.setTempCurrentImage(image);
        try {
            Undo.undo();
        } finally {
            WindowManager.setTempCurrentImage(null);
        }
        assertEquals(0, PatternOverlay.count(image));
        assertEquals(1, image.getOverlay().size());
    }

    @Test
    void rings_besidePatternLaid_bothStay() {
        ImagePlus image = RingPatterns.aluminium();
        Launching.macro(image, "command.LayPattern", "crystal=aluminium scale=180 zone=[0 0 1]");
        Sitting laid = Sitting.of(image);
        int spots = PatternOverlay.count(image);
        Launching.macro(image, RINGS, ALUMINIUM + "rings");
        assertEquals(laid, Sitting.of(image));
        int all = PatternOverlay.count(image);
        assertTrue(all > spots);
        laid.show(image);
        assertEquals(all, PatternOverlay.count(image));
    }

    @Test
    void ringsFalse_drawsNothing() {
        ImagePlus image = RingPatterns.aluminium();
        assertEquals(Optional.empty(), Launching.macro(image, RINGS, ALUMINIUM + "rings=false"));
        assertEquals(0, PatternOverlay.count(image));
    }

    @Test
    void keep_isReadBack_andNeverReplaced() throws Exception {
        String keep = ALUMINIUM
                + "rings=false keepcalibration=[Hall two] instrument=Bench cameralength=520 pixelsize=14 binning=2 ";
        assertEquals(Optional.empty(), Launching.macro(RingPatterns.aluminium(), RINGS, keep));
        Calibration kept = UserFolder.calibrations().list().find("Hall two").orElseThrow();
        assertEquals(RingPatterns.CONSTANT, kept.constant().value(), 0.001 * RingPatterns.CONSTANT);
        assertEquals("Aluminium", kept.standard());
        assertEquals("Bench", kept.setting().instrument());
        assertEquals(OptionalDouble.of(520), kept.setting().cameraLength());
        assertEquals(OptionalDouble.of(14), kept.setting().pixelSize());
        assertEquals(2, kept.setting().binning());
        Optional<String> said = Launching.macro(RingPatterns.aluminium(), RINGS, keep);
        assertTrue(said.orElse("").contains("another calibration is kept"), said.toString());
        assertEquals(1, UserFolder.calibrations().list().calibrations().size());
    }

    @Test
    void wrongStandard_isSaid_andNotKept() throws Exception {
        CalibrateRings command = command(RingPatterns.aluminium(), "crystal=silicon keepcalibration=bad rings=false");
        command.run();
        String said = command.isCanceled() ? command.getCancelReason() : output(command);
        assertTrue(said.contains("not fit Silicon") || said.contains("lines of Silicon"), said);
        assertTrue(UserFolder.calibrations().list().calibrations().isEmpty());
    }

    @Test
    void thallium_isCautionedOnce() {
        CalibrateRings command = command(RingPatterns.aluminium(), "crystal=[thallium chloride] rings=false");
        command.run();
        if (!command.isCanceled()) {
            long cautions = output(command)
                    .lines()
                    .filter(l -> l.toLowerCase().contains("toxic"))
                    .count();
            assertEquals(1, cautions, output(command));
        }
        assertTrue(
                CrystalReport.of(io.github.zonewright.crystal.CrystalShelf.find("TlCl")
                                .orElseThrow())
                        .cautions()
                        .stream()
                        .anyMatch(c -> c.contains("toxic")));
    }

    @Test
    void colourImage_isReadByItsLuminance() {
        ImageProcessor grey = RingPatterns.aluminium().getProcessor();
        grey.setMinAndMax(0, 700);
        ImagePlus image = new ImagePlus("colour", grey.convertToRGB());
        String answer = answer(image, ALUMINIUM);
        assertTrue(answer.contains("luminance"), answer);
    }

    @Test
    void noRings_isRefused() {
        for (ImagePlus image : List.of(
                TestPatterns.imageOfUser(),
                RingPatterns.image(2),
                new ImagePlus("blank", new ByteProcessor(64, 64)),
                new ImagePlus("blank colour", new ColorProcessor(64, 64)),
                new ImagePlus("1 x 1", new ByteProcessor(1, 1)))) {
            Fingerprint before = Fingerprint.of(image);
            Optional<String> said = Launching.macro(image, RINGS, ALUMINIUM + "rings keepcalibration=none");
            assertTrue(said.orElse("").startsWith("Rings "), image.getTitle() + said);
            assertFalse(said.get().contains("Exception"), said.get());
            before.assertSame(image);
            assertEquals(0, PatternOverlay.count(image));
        }
        assertFalse(Files.exists(folder.resolve("calibrations")));
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "kilovolts=0|Accelerating voltage",
                "crystal=unobtainium|Crystal",
                "roughscale=many|Rough camera constant",
                "roughscale=-4|Rough camera constant",
                "tolerance=50|Scale is good to",
                "cameralength=0|Nominal camera length",
                "pixelsize=x|Pixel size",
                "binning=0|Binning"
            })
    void wrongValue_isNamed(String options, String named) {
        ImagePlus image = RingPatterns.aluminium();
        Fingerprint before = Fingerprint.of(image);
        Optional<String> said = Launching.macro(image, RINGS, options + " rings");
        assertTrue(said.orElse("").contains(named), said.toString());
        before.assertSame(image);
        assertEquals(0, PatternOverlay.count(image));
    }

    private static CalibrateRings command(ImagePlus image, String options) {
        CalibrateRings command = new CalibrateRings();
        List<CommandParameter> parameters = CommandParameter.of(command);
        parameters.forEach(p -> p.fillImage(image));
        parameters.stream().filter(CommandParameter::isAsked).forEach(p -> p.readMacro(options));
        return command;
    }

    private static String answer(ImagePlus image, String options) {
        CalibrateRings command = command(image, options);
        command.run();
        assertFalse(command.isCanceled(), command.getCancelReason());
        return output(command);
    }

    private static String output(CalibrateRings command) {
        return CommandParameter.of(command).stream()
                .filter(p -> p.name().equals("answer"))
                .findFirst()
                .orElseThrow()
                .text();
    }

    private static double number(String answer, String pattern) {
        Matcher matcher = Pattern.compile(pattern).matcher(answer);
        assertTrue(matcher.find(), answer);
        return Double.parseDouble(matcher.group(1));
    }
}
