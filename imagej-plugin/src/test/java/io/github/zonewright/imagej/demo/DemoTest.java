package io.github.zonewright.imagej.demo;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import ij.IJ;
import ij.ImagePlus;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.imagej.command.ExamplePattern;
import io.github.zonewright.imagej.session.Instrument;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class DemoTest {
    @BeforeEach
    void exampleIsThere() {
        assumeTrue(
                ExamplePattern.class.getResource("/io/github/zonewright/imagej/demo/harrow-quay.tif") != null,
                "the example pattern is not in this build");
    }

    @Test
    void run_saysTheAnswerAndWritesIt(@TempDir Path folder) throws IOException {
        ByteArrayOutputStream said = new ByteArrayOutputStream();
        Path output = folder.resolve("new folder");
        assertTrue(Demo.run(output, new PrintStream(said, true, StandardCharsets.UTF_8)));
        String text = said.toString(StandardCharsets.UTF_8);
        for (String part : List.of(
                "Crystal", "Zone axis", "Rotation", "Camera constant", "Residual", "Spots explained", "record.cif")) {
            assertTrue(text.contains(part), text);
        }
        assertTrue(text.lines().count() <= 12, text);
        ImagePlus picture = IJ.openImage(output.resolve("overlay.png").toString());
        assertEquals(ExamplePattern.load().image().getWidth(), picture.getWidth());
        assertTrue(Files.size(output.resolve("spots.csv")) > 100);
        assertTrue(Files.readString(output.resolve("report.html")).contains("Settled: [2 1 1] of Austenite."));
        FitDocument record = FitDocument.read(output.resolve("record.cif"));
        assertEquals(
                ExamplePattern.load().crystal().name(),
                record.placement().crystal().name());
    }

    @Test
    void example_saysWhatIsKnown() throws IOException {
        ExamplePattern example = ExamplePattern.load();
        example.keep();
        Instrument known = Instrument.of(example.image()).orElseThrow();
        assertEquals(example.cameraConstant(), known.cameraConstant(example.image()));
        assertEquals(example.crystal(), Instrument.crystalOf(example.image()).orElseThrow());
    }
}
