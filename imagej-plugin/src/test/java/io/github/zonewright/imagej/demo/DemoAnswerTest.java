package io.github.zonewright.imagej.demo;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.io.FileSaver;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.imagej.bridge.ReciprocalCalibration;
import io.github.zonewright.imagej.command.ExamplePattern;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Comparator;
import java.util.List;
import java.util.stream.Stream;
import javax.imageio.ImageIO;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The demo as {@code mvn -Pdemo package} runs it, without the window, against what its pattern was made from. */
class DemoAnswerTest {
    private static final Placement TRUTH = DemoPatternMaker.TRUTH;

    @TempDir
    Path output;

    @Test
    void run_findsWhatThePatternWasMadeFrom() throws IOException {
        run();
        FitDocument record = FitDocument.read(output.resolve("record.cif"));
        Placement found = record.placement();
        ZoneSetting nearest = nearest(record);
        assertEquals(TRUTH.crystal().name(), found.crystal().name());
        assertEquals(Math.toDegrees(TRUTH.setting().rotation()), Math.toDegrees(nearest.rotation()), 0.1);
        assertEquals(Math.toDegrees(TRUTH.setting().leanX()), Math.toDegrees(nearest.leanX()), 0.5);
        assertEquals(Math.toDegrees(TRUTH.setting().leanY()), Math.toDegrees(nearest.leanY()), 0.5);
        assertEquals(0, TRUTH.camera().centre().distanceTo(found.camera().centre()), 0.5);
        assertEquals(1, found.camera().constant() / TRUTH.camera().constant(), 0.002);
    }

    /**
     * The README shows what is printed; its figures may move in their last digits. Consoles that know ASCII alone must not
     * spoil it.
     */
    @Test
    void run_printsWhatTheReadmeShows() throws IOException {
        String readme = anyDigits(Files.readString(Path.of("..", "README.md"), StandardCharsets.UTF_8));
        List<String> answer =
                run().lines().takeWhile(line -> !line.startsWith("Written")).toList();
        assertEquals(9, answer.size());
        for (String line : answer) {
            assertTrue(readme.contains("    " + anyDigits(line) + "\n"), line);
            assertTrue(StandardCharsets.US_ASCII.newEncoder().canEncode(line), line);
        }
    }

    @Test
    void run_recordAndTableSayTheSame() throws IOException {
        run();
        FitDocument record = FitDocument.read(output.resolve("record.cif"));
        int explained = record.solution().orElseThrow().matches().size();
        try (Stream<String> lines = Files.lines(output.resolve("spots.csv"), StandardCharsets.UTF_8)) {
            assertTrue(lines.count() > explained);
        }
        var picture = ImageIO.read(output.resolve("overlay.png").toFile());
        assertTrue(picture.getWidth() >= 512);
    }

    @Test
    void example_isWhatTheMakerMakes() throws IOException {
        ImagePlus shipped = ExamplePattern.load().image();
        ImagePlus made = DemoPatternMaker.make();
        assertArrayEquals((short[]) made.getProcessor().getPixels(), (short[])
                shipped.getProcessor().getPixels());
        assertArrayEquals(new FileSaver(made).serialize(), new FileSaver(DemoPatternMaker.make()).serialize());
    }

    @Test
    void example_calibrationSaysWhatTheMicroscopistKnows() throws IOException {
        ExamplePattern example = ExamplePattern.load();
        assertEquals(DemoPatternMaker.TOLD_CONSTANT, example.cameraConstant());
        double stated =
                ReciprocalCalibration.of(example.image()).cameraConstant().orElseThrow();
        assertEquals(DemoPatternMaker.TOLD_CONSTANT, stated, 1e-9);
    }

    private static String anyDigits(String text) {
        return text.replace("\r\n", "\n").replaceAll("\\d", "0").replace(" -0.", " 0.");
    }

    private String run() throws IOException {
        var bytes = new ByteArrayOutputStream();
        try (var out = new PrintStream(bytes, true, StandardCharsets.UTF_8)) {
            assertTrue(Demo.run(output, out), "no answer");
        }
        return bytes.toString(StandardCharsets.UTF_8);
    }

    /** The answer, or its half-turn partner, in the choice of equivalent axes that comes nearest to the truth. */
    private static ZoneSetting nearest(FitDocument record) {
        Placement found = record.placement();
        var lattice = found.crystal().lattice();
        Rotation truth = TRUTH.orientation().rotation();
        Stream<Orientation> both =
                Stream.concat(Stream.of(found.orientation()), record.solution().orElseThrow().halfTurn().stream());
        Orientation best = both.flatMap(o -> found.crystal().spaceGroup().properLaueRotations(lattice).stream()
                        .map((Matrix3 symmetry) -> new Orientation(o.rotation().after(Rotation.ofMatrix(symmetry)))))
                .min(Comparator.comparingDouble(o -> truth.angleTo(o.rotation())))
                .orElseThrow();
        return ZoneSetting.of(
                best, lattice, TRUTH.setting().zone(), TRUTH.setting().reference());
    }
}
