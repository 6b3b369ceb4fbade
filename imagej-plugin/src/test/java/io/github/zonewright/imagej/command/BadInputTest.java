package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.process.ByteProcessor;
import ij.process.ColorProcessor;
import ij.process.FloatProcessor;
import ij.process.ShortProcessor;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.Optional;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;

/** Bad input gets a sentence, and changes nothing. */
class BadInputTest {
    private static final String FIND = "command.FindZoneAxis";
    private static final String LAY = "command.LayPattern";
    private static final String GOOD = "crystal=copper kilovolts=200 scale=120 table=false ";

    static Stream<ImagePlus> imagesWithoutPattern() {
        float[] nan = new float[64 * 64];
        Arrays.fill(nan, Float.NaN);
        float[] infinite = new float[64 * 64];
        Arrays.fill(infinite, Float.POSITIVE_INFINITY);
        return Stream.of(
                new ImagePlus("blank 8 bit", new ByteProcessor(64, 64)),
                new ImagePlus("blank 16 bit", new ShortProcessor(64, 64)),
                new ImagePlus("blank colour", new ColorProcessor(64, 64)),
                new ImagePlus("1 x 1", new ByteProcessor(1, 1)),
                new ImagePlus("1 x 64", new ShortProcessor(1, 64)),
                new ImagePlus("all NaN", new FloatProcessor(64, 64, nan)),
                new ImagePlus("all infinite", new FloatProcessor(64, 64, infinite)));
    }

    @ParameterizedTest
    @MethodSource("imagesWithoutPattern")
    void find_imageWithoutPattern_isRefused(ImagePlus image) {
        Fingerprint before = Fingerprint.of(image);
        Optional<String> said = Launching.macro(image, FIND, GOOD);
        assertSentence(said);
        before.assertSame(image);
        assertEquals(0, PatternOverlay.count(image), image.getTitle());
    }

    @Test
    void find_someNaN_doesNotFail() {
        FloatProcessor pixels = TestPatterns.image().getProcessor().convertToFloatProcessor();
        for (int x = 0; x < pixels.getWidth(); x++) {
            pixels.setf(x, 3, Float.NaN);
        }
        ImagePlus image = new ImagePlus("some NaN", pixels);
        Fingerprint before = Fingerprint.of(image);
        Launching.macro(image, FIND, GOOD);
        before.assertSame(image);
    }

    @ParameterizedTest
    @CsvSource({FIND, LAY, "command.RemoveMarks"})
    void noImage_isSaid(String command) {
        Optional<String> said = Launching.macro(
                null, command, GOOD.replace("table=false ", command.equals(FIND) ? "table=false " : ""));
        assertSentence(said);
        assertTrue(said.get().contains("o image is open"), said.get());
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "kilovolts=0|Accelerating voltage",
                "kilovolts=abc|Accelerating voltage",
                "kilovolts=-200|Accelerating voltage",
                "scale=0|Scale",
                "scale=-5|Scale",
                "scale=NaN|Scale",
                "crystal=unobtainium|Crystal",
                "scalekind=furlongs|Scale given as",
                "scalekind=[camera length] pixelsize=0|Pixel size",
                "scalekind=[camera length] binning=0|Binning",
                "cif=[/no/such/file.cif]|CIF file",
                "tolerance=50|Scale is good to",
                "indices=perhaps|Show indices"
            })
    void find_wrongValue_isNamed(String options, String named) {
        ImagePlus image = TestPatterns.imageOfUser();
        Fingerprint before = Fingerprint.of(image);
        Optional<String> said = Launching.macro(image, FIND, options + " table=false");
        assertSentence(said);
        assertTrue(said.get().contains(named), said.get());
        before.assertSame(image);
        assertEquals(0, PatternOverlay.count(image));
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "zone=[0 0 0]|Zone axis",
                "zone=[x y z]|direction",
                "zone=[1 1 0] reference=[1 1 1]|Reference reflection",
                "zone=[1 1 0] reference=[0 0 0]|Reference reflection",
                "leanx=95|lean",
                "centre=here|Centre",
                "thickness=0|Foil thickness",
                "thickness=-1|Foil thickness",
                "target=[new image] side=3|Side of a new image"
            })
    void lay_wrongValue_isNamed(String options, String named) {
        ImagePlus image = TestPatterns.imageOfUser();
        Fingerprint before = Fingerprint.of(image);
        Optional<String> said = Launching.macro(image, LAY, "crystal=copper scale=120 " + options);
        assertSentence(said);
        assertTrue(said.get().toLowerCase().contains(named.toLowerCase()), said.get());
        before.assertSame(image);
        assertEquals(0, PatternOverlay.count(image));
    }

    @Test
    void calibrationInNanometres_isNoScale() {
        ImagePlus image = TestPatterns.image();
        image.getLocalCalibration().setUnit("nm");
        Optional<String> said = Launching.macro(image, FIND, GOOD + "scalekind=[image calibration]");
        assertSentence(said);
        assertTrue(said.get().contains("nm"), said.get());
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {"data_empty|_cell_length_a", "this is no CIF|", "'data_x\n_cell_length_a 3.6'|_cell"})
    void cifWithoutCell_isRefused(String text, String named, @TempDir Path folder) throws IOException {
        Path cif = folder.resolve("bad.cif");
        Files.writeString(cif, text);
        Optional<String> said = Launching.macro(TestPatterns.image(), FIND, GOOD + "cif=[" + cif + "]");
        assertSentence(said);
        assertTrue(named == null || said.get().contains(named), said.get());
    }

    private static void assertSentence(Optional<String> said) {
        assertTrue(said.isPresent(), "nothing was said");
        String text = said.get();
        assertTrue(text.length() > 15 && text.length() < 400, text);
        assertTrue(Character.isUpperCase(text.charAt(0)) && text.matches("(?s).*[.!?]"), text);
        assertFalse(text.contains("Exception") || text.contains("java."), text);
    }
}
