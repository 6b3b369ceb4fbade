package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import groovy.lang.Binding;
import groovy.lang.GroovyShell;
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
import java.io.PrintWriter;
import java.io.StringWriter;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.scijava.Context;
import org.scijava.command.CommandService;

/** Runs what README.md shows: its Java, its macro and its script, each on the example pattern. */
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
        assertEquals(37, read.solution().orElseThrow().matches().size());
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

    /** The lines that begin with #@ are SciJava's parameters; its services and the image are bound as they ask. */
    @Test
    void script_runsOnTheExample() throws IOException {
        String script = between(Files.readString(README, StandardCharsets.UTF_8), "```groovy\n", "```");
        assertEquals(
                List.of("#@ CommandService commands", "#@ ImagePlus image"),
                script.lines().filter(line -> line.startsWith("#@")).toList());
        StringWriter said = new StringWriter();
        Context context = new Context(CommandService.class);
        try {
            Binding binding = new Binding(new HashMap<>(Map.of(
                    "commands",
                    context.service(CommandService.class),
                    "image",
                    ExamplePattern.load().image(),
                    "out",
                    new PrintWriter(said, true))));
            new GroovyShell(binding).evaluate(script.replaceAll("(?m)^#@.*$", ""));
        } finally {
            context.dispose();
        }
        assertTrue(said.toString().startsWith("Austenite, zone axis [211]"), said.toString());
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
