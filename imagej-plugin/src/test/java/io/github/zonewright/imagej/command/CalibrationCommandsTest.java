package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.Prefs;
import ij.measure.Calibration;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.RingPatterns;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.bridge.CalibrationTable;
import io.github.zonewright.imagej.bridge.ImageCalibration;
import io.github.zonewright.imagej.bridge.ReciprocalCalibration;
import io.github.zonewright.imagej.session.AppliedCalibration;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.KeptCalibrations;
import io.github.zonewright.imagej.session.ScaleKind;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.imagej.session.UserFolder;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.spots.MeasuredValue;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Kept calibrations as a macro uses them, with no display. */
class CalibrationCommandsTest {
    private static final String APPLY = "command.ApplyCalibration";
    private static final String KEEP = "command.KeepCalibration";
    private static final String SET = "command.SetImageCalibration";

    @TempDir
    private Path folder;

    private final ImagePlus image = TestPatterns.imageOfUser();

    @BeforeEach
    void keepApart() {
        Prefs.set(UserFolder.KEY, folder.toString());
    }

    @AfterEach
    void forgetFolder() {
        Prefs.set(UserFolder.KEY, "");
        image.setGlobalCalibration(null);
    }

    private static io.github.zonewright.calibration.Calibration kept(String name, int daysOld) throws IOException {
        io.github.zonewright.calibration.Calibration made = new io.github.zonewright.calibration.Calibration(
                name,
                new MicroscopeSetting("Bench", 200, OptionalDouble.of(520), OptionalDouble.of(14), 2),
                LocalDate.now().minusDays(daysOld),
                "Gold",
                new MeasuredValue(300, 0.2),
                new MeasuredValue(1.02, 0.001),
                new MeasuredValue(Math.toRadians(33), 0.01),
                true,
                Optional.of(new MeasuredValue(Math.toRadians(30), 0.01)));
        UserFolder.calibrations().add(made);
        return made;
    }

    @Test
    void apply_accountsForBinning_andTakesEllipseToleranceAndMirror() throws IOException {
        kept("Morning", 3);
        Fingerprint before = Fingerprint.of(image);
        String answer = answer(APPLY, image, "calibration=morning binning=1 kilovolts=200");
        assertTrue(
                answer.matches("Morning: camera constant 600\\.0+ ± 0\\.40* px·Å at binning 1 \\(made at 2\\).*"),
                answer);
        assertTrue(answer.contains("image rotation 30."), answer);
        assertEquals(1, answer.lines().count(), answer);
        Instrument now = Instrument.of(image).orElseThrow();
        assertEquals(600, now.cameraConstant(image), 1e-9);
        assertEquals(0.5, now.tolerancePercent(), 1e-12);
        assertTrue(now.mirrored());
        before.assertSame(image);
    }

    @Test
    void apply_oldOrOfAnotherSetting_isWarned() throws IOException {
        kept("Spring", 200);
        String answer =
                answer(APPLY, image, "calibration=Spring kilovolts=300 cameralength=800 pixelsize=15 binning=2");
        assertTrue(answer.contains("is 200 days old; 90 days are taken as the limit."), answer);
        assertTrue(answer.contains("It is for 200 kV, the image is of 300 kV."), answer);
        assertTrue(answer.contains("It is for the camera length 520 mm, the image is of 800 mm."), answer);
        assertTrue(answer.contains("It is for pixels of 14 µm, the image has pixels of 15 µm."), answer);
    }

    @Test
    void lay_byKeptCalibration_hasItsEllipse() throws IOException {
        kept("Morning", 3);
        answer(APPLY, image, "calibration=Morning binning=2");
        assertEquals(
                Optional.empty(),
                Launching.macro(image, "command.LayPattern", "crystal=gold scalekind=[kept calibration] zone=[0 0 1]"));
        Camera camera = Sitting.of(image).placement().orElseThrow().camera();
        assertEquals(300, camera.constant(), 1e-9);
        assertEquals(1.02, camera.ellipseRatio(), 1e-12);
        assertEquals(33, Math.toDegrees(camera.ellipseAzimuth()), 1e-9);
        assertTrue(camera.mirrored());
    }

    @ParameterizedTest
    @CsvSource({"command.LayPattern", "command.FindZoneAxis"})
    void keptCalibration_noneApplied_isRefused(String command) {
        Optional<String> said = Launching.macro(image, command, "crystal=gold scalekind=[kept calibration]");
        assertTrue(said.orElse("").contains("no calibration is in use for this image"), said.toString());
    }

    @Test
    void rings_areUsedForTheImage_withTheirCentre() {
        ImagePlus rings = RingPatterns.aluminium();
        assertEquals(
                Optional.empty(),
                Launching.macro(rings, "command.CalibrateRings", "crystal=aluminium kilovolts=200 rings=false"));
        Instrument now = Instrument.of(rings).orElseThrow();
        assertEquals(RingPatterns.CONSTANT, now.cameraConstant(rings), 0.001 * RingPatterns.CONSTANT);
        assertEquals(
                RingPatterns.RATIO,
                now.camera(now.applied().orElseThrow().centre().orElseThrow(), rings)
                        .ellipseRatio(),
                0.003);
        assertEquals(
                RingPatterns.X,
                now.applied().orElseThrow().centre().orElseThrow().x(),
                0.3);
        Launching.macro(rings, "command.CalibrateRings", "crystal=silicon kilovolts=200 rings=false");
        assertEquals(Optional.of(now), Instrument.of(rings), "a standard that does not fit changes nothing");
    }

    @Test
    void search_byKeptCalibration_isHeldToIt() throws IOException {
        io.github.zonewright.calibration.Calibration exact = new io.github.zonewright.calibration.Calibration(
                "Exact",
                new MicroscopeSetting("", 200, OptionalDouble.empty(), OptionalDouble.empty(), 1),
                LocalDate.now(),
                "",
                new MeasuredValue(TestPatterns.CONSTANT, 0.1),
                new MeasuredValue(1, 0.001),
                new MeasuredValue(0, 1),
                false,
                Optional.empty());
        UserFolder.calibrations().add(exact);
        answer(APPLY, image, "calibration=Exact");
        assertEquals(
                Optional.empty(),
                Launching.macro(
                        image,
                        "command.FindZoneAxis",
                        "crystal=copper scalekind=[kept calibration] scale=33 tolerance=20 table=false"));
        double found =
                Sitting.of(image).chosen().orElseThrow().placement().camera().constant();
        assertEquals(TestPatterns.CONSTANT, found, 0.01 * TestPatterns.CONSTANT);
        assertEquals(exact, Instrument.of(image).orElseThrow().calibration().orElseThrow());
    }

    @Test
    void search_byKeptCalibration_holdsItsEllipse() throws IOException {
        io.github.zonewright.calibration.Calibration made = kept("Morning", 3);
        answer(APPLY, image, "calibration=Morning binning=2");
        var camera = Instrument.of(image).orElseThrow().knownCamera(image);
        assertEquals(made.ellipseRatio().value(), camera.ellipseRatio());
        assertEquals(made.ellipseAzimuth().value(), camera.ellipseAzimuth());
        assertEquals(made.ellipseRatio().error(), camera.ellipseError().orElseThrow(), 5e-4);
        assertEquals(0.005, camera.tolerance(), 1e-12);
        assertTrue(new Instrument(200, ScaleKind.PIXELS, 500, 14, 1, 3, false)
                .knownCamera(image)
                .ellipseError()
                .isEmpty());
    }

    @Test
    void keep_ofASolution_takesItsCrystalAsStandard() throws IOException {
        Launching.macro(
                image,
                "command.FindZoneAxis",
                "crystal=copper scale=" + TestPatterns.CONSTANT + " scalekind=[camera constant, px·Å] table=false");
        double found =
                Sitting.of(image).chosen().orElseThrow().placement().camera().constant();
        String answer = answer(KEEP, image, "keepcalibration=[By copper] cameralength=300 imagerotation=12.5");
        assertTrue(answer.contains("is kept in " + folder), answer);
        io.github.zonewright.calibration.Calibration read = KeptCalibrations.of("By copper");
        assertEquals("Copper", read.standard());
        assertEquals(found, read.constant().value());
        assertEquals(OptionalDouble.of(300), read.setting().cameraLength());
        assertEquals(12.5, Math.toDegrees(read.imageRotation().orElseThrow().value()), 1e-9);
        Optional<String> again = Launching.macro(image, KEEP, "keepcalibration=[by COPPER]");
        assertTrue(again.orElse("").contains("another calibration is kept"), again.toString());
    }

    @Test
    void keep_nothingKnown_isRefused() throws IOException {
        Optional<String> said = Launching.macro(image, KEEP, "keepcalibration=x");
        assertTrue(said.orElse("").contains("nothing is known of it"), said.toString());
        assertFalse(Files.exists(folder.resolve("calibrations")));
    }

    @Test
    void listRenameDelete() throws IOException {
        assertTrue(answer("command.ListCalibrations", image, "").startsWith("No calibration is kept in "));
        kept("Morning", 3);
        kept("Evening", 3);
        Files.writeString(folder.resolve("calibrations").resolve("bad.cif"), "nonsense");
        String list = answer("command.ListCalibrations", image, "");
        assertTrue(list.contains("Evening: ") && list.contains("Morning: ") && list.contains("bad.cif: "), list);
        answer("command.RenameCalibration", image, "calibration=Morning newname=Noon");
        assertTrue(Launching.macro(image, "command.RenameCalibration", "calibration=Noon newname=evening")
                .orElse("")
                .contains("expected another name"));
        answer("command.DeleteCalibration", image, "calibration=noon");
        assertEquals(List.of("Evening"), KeptCalibrations.names());
        Optional<String> gone = Launching.macro(image, "command.DeleteCalibration", "calibration=Noon");
        assertTrue(gone.orElse("").contains("expected one of \"Evening\""), gone.toString());
    }

    @Test
    void table_hasARowForEach() throws IOException {
        var table = CalibrationTable.of(List.of(kept("Morning", 3), kept("Evening", 4)));
        assertEquals(2, table.size());
        assertEquals(300, table.getValue("camera constant (px·Å)", 0));
        assertEquals(30, table.getValue("image rotation (°)", 0), 1e-9);
        assertEquals("Evening", table.getStringValue("name", 1));
    }

    @Test
    void setImage_isAsked_saysWhatItReplaced_andIsPutBack() throws IOException {
        kept("Morning", 3);
        answer(APPLY, image, "calibration=Morning binning=2");
        Calibration own = image.getLocalCalibration().copy();
        String said = answer(SET, image, "takefrom=result");
        assertTrue(said.startsWith("The image's calibration is 0.0333333 1/nm per pixel now; it was "), said);
        assertEquals(300, ReciprocalCalibration.of(image).cameraConstant().orElseThrow(), 1e-9);
        answer(SET, image, "takefrom=[camera constant] constant=500");
        assertEquals(0.02, image.getLocalCalibration().pixelWidth, 1e-12);
        answer(SET, image, "takefrom=what");
        assertTrue(own.equals(image.getLocalCalibration()));
        assertFalse(ImageCalibration.wasSet(image));
        assertTrue(Launching.macro(image, SET, "takefrom=what").orElse("").contains("not set from here"));
    }

    @Test
    void setImage_beneathAGlobalOne_isRefused() {
        Calibration global = new Calibration();
        global.setUnit("mm");
        global.pixelWidth = 0.1;
        image.setGlobalCalibration(global);
        Fingerprint before = Fingerprint.of(image);
        Optional<String> said = Launching.macro(image, SET, "takefrom=[camera constant] constant=500");
        assertTrue(said.orElse("").contains("a global one is set, 0.1"), said.toString());
        before.assertSame(image);
        assertFalse(ImageCalibration.wasSet(image));
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "command.ApplyCalibration|calibration=nowhere|none is kept in",
                "command.ApplyCalibration|calibration=x binning=0|Binning",
                "command.ApplyCalibration|calibration=x kilovolts=-1|Accelerating voltage",
                "command.SetImageCalibration|takefrom=result|there is no result on this image",
                "command.SetImageCalibration|takefrom=thin|Take it from",
                "command.SetImageCalibration|takefrom=camera constant=0|Camera constant",
                "command.RenameCalibration|calibration=x newname=y|none is kept in"
            })
    void wrongValue_isNamed_andNothingChanges(String command, String options, String named) {
        Fingerprint before = Fingerprint.of(image);
        Optional<String> said = Launching.macro(image, command, options);
        assertTrue(said.orElse("").contains(named), said.toString());
        before.assertSame(image);
    }

    @Test
    void wrongOptionalNumbers_areNamed() throws IOException {
        kept("Morning", 3);
        for (String wrong : List.of("cameralength=0", "cameralength=far", "pixelsize=NaN")) {
            Optional<String> said = Launching.macro(image, APPLY, "calibration=Morning " + wrong);
            assertTrue(said.orElse("").contains("expected a number above 0, or nothing"), said.toString());
        }
        assertTrue(Instrument.of(image).isEmpty());
    }

    @Test
    void noImage_isSaid() {
        Map.of(APPLY, "calibration=x", KEEP, "keepcalibration=x", SET, "takefrom=[result on this image]")
                .forEach((command, options) -> {
                    Optional<String> said = Launching.macro(null, command, options);
                    assertTrue(said.orElse("").startsWith("No image is open"), command + said);
                });
    }

    @Test
    void instrument_lastCalibration_servesTheNextImage() throws IOException {
        io.github.zonewright.calibration.Calibration morning = kept("Morning", 3);
        Instrument said =
                new Instrument(200, ScaleKind.PIXELS, 500, 14, 1, 3, false).with(AppliedCalibration.of(morning), 2);
        said.remember();
        assertEquals(Optional.of(morning), Instrument.last().calibration());
        said.withKind(ScaleKind.PIXELS).remember();
        assertEquals(Optional.empty(), Instrument.last().calibration());
    }

    private static String answer(String command, ImagePlus image, String options) {
        try {
            PatternCommand made = (PatternCommand) Class.forName("io.github.zonewright.imagej." + command)
                    .getConstructor()
                    .newInstance();
            List<CommandParameter> parameters = CommandParameter.of(made);
            parameters.forEach(p -> p.fillImage(image));
            parameters.stream().filter(CommandParameter::isAsked).forEach(p -> p.readMacro(options));
            made.run();
            assertFalse(made.isCanceled(), made.getCancelReason());
            return parameters.stream()
                    .filter(p -> p.name().equals("answer"))
                    .findFirst()
                    .orElseThrow()
                    .text();
        } catch (ReflectiveOperationException e) {
            throw new IllegalStateException(e);
        }
    }
}
