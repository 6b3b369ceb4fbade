package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.indexing.OrientationSearch;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Runs what README.md shows: its Java and its macro, both on the example pattern. */
class ReadmeTest {
    private static final Path README = Path.of("..", "README.md");
    private static final Path SOURCE =
            Path.of("src/test/java", ReadmeTest.class.getName().replace('.', '/') + ".java");
    private static final Pattern MACRO = Pattern.compile("run\\(\"([^\"]+)\",\\s+\"([^\"]+)\"\\);");

    @TempDir
    Path folder;

    @Test
    void java_isWhatThisTestCompiles() throws IOException {
        String shown = between(Files.readString(README, StandardCharsets.UTF_8), "```java\n", "```");
        String run = between(Files.readString(SOURCE, StandardCharsets.UTF_8), "// begin\n", "        // end");
        assertEquals(run.stripTrailing().stripIndent(), shown.stripTrailing());
    }

    @Test
    void java_findsTheZoneOfTheExample() throws IOException {
        ImagePlus example = ExamplePattern.load().image();
        Path record = folder.resolve("record.cif");
        find(
                example.getWidth(),
                example.getHeight(),
                (short[]) example.getProcessor().getPixels(),
                record);
        FitDocument read = FitDocument.read(record);
        assertEquals(36, read.solution().orElseThrow().matches().size());
        assertEquals(113.6, ExamplePattern.load().cameraConstant(), "the number in the README");
    }

    @Test
    void macro_runsOnTheExample() throws IOException {
        Matcher macro = MACRO.matcher(Files.readString(README, StandardCharsets.UTF_8));
        assertTrue(macro.find(), "no run(…) in the README");
        assertEquals("Find Zone Axis...", macro.group(1));
        String options = macro.group(2).replace("/tmp/", folder + "/");
        Optional<String> error = Launching.macro(ExamplePattern.load().image(), "command.FindZoneAxis", options);
        assertEquals(Optional.empty(), error);
        assertTrue(Files.exists(folder.resolve("record.cif")) && Files.exists(folder.resolve("spots.csv")));
    }

    private static void find(int width, int height, short[] grey, Path record) throws IOException {
        // begin
        MeasuredPattern measured = SpotFinder.measure(GrayImage.ofUnsignedShorts(width, height, grey));
        Crystal crystal = CrystalShelf.find("austenite").orElseThrow(); // or CrystalCif.read(path).get(0)
        OrientationSearch search = OrientationSearch.of(crystal, Beam.ofKilovolts(200), 113.6, 0.03, false);
        SearchResult result = search.find(measured);
        Solution best = result.best().orElseThrow(() -> new IllegalStateException(result.explanation()));
        ZoneSetting setting = best.placement().setting();
        System.out.printf("zone axis [%s], leaning by %.1f°%n", setting.zone(), Math.toDegrees(setting.lean()));
        System.out.printf("azimuth of %s: %.2f°%n", setting.reference(), Math.toDegrees(setting.rotation()));
        System.out.printf("%.0f %% of the spots explained%n", 100 * best.explainedFraction());
        FitDocument.of(best).write(record);
        // end
    }

    private static String between(String text, String begin, String end) {
        int from = text.replace("\r\n", "\n").indexOf(begin) + begin.length();
        return text.replace("\r\n", "\n")
                .substring(from, text.replace("\r\n", "\n").indexOf(end, from));
    }
}
