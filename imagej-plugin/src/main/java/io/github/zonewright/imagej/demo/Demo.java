package io.github.zonewright.imagej.demo;

import ij.ImagePlus;
import ij.io.FileSaver;
import io.github.zonewright.imagej.command.Answer;
import io.github.zonewright.imagej.command.ExamplePattern;
import io.github.zonewright.imagej.session.Figures;
import io.github.zonewright.imagej.session.Keep;
import io.github.zonewright.imagej.session.Search;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.Verdict;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredValue;
import java.io.File;
import java.io.IOException;
import java.io.PrintStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Locale;
import java.util.Optional;

/** The main job on the example pattern, as {@code mvn -Pdemo package} runs it. */
public final class Demo {
    private Demo() {}

    /**
     * Runs the demo. It opens a window at the end unless the system property {@code demo.window} is false or no display
     * answers.
     *
     * @param arguments the folder to write to; without one the system property {@code demo.output} names it
     * @throws IOException if the example can't be read or the results can't be written
     */
    public static void main(String[] arguments) throws IOException {
        // A display that is named but dead would end the drawing of the picture.
        System.setProperty("java.awt.headless", "true");
        String folder = arguments.length > 0 ? arguments[0] : System.getProperty("demo.output", "demo");
        Path output = Path.of(folder).toAbsolutePath().normalize();
        boolean solved = run(output, System.out);
        if (solved && !"false".equals(System.getProperty("demo.window"))) {
            System.out.println(DemoWindow.open(output));
        }
    }

    /**
     * Finds, fits, says and writes.
     *
     * @param output the folder to write to
     * @param out where the answer is printed
     * @return whether there was an answer
     * @throws IOException if the example can't be read or the results can't be written
     */
    static boolean run(Path output, PrintStream out) throws IOException {
        ExamplePattern example = ExamplePattern.load();
        MeasuredPattern measured = Search.measure(example.image());
        SearchResult result = example.search().run(measured, part -> {}, () -> false);
        Optional<Solution> best = result.best();
        if (best.isEmpty()) {
            out.println("Zonewright: no answer. " + result.explanation());
            return false;
        }
        Sitting.EMPTY
                .withMeasured(measured)
                .withSolutions(result.solutions())
                .withLabels(true)
                .show(example.image());
        say(best.get(), out);
        line(out, "Verdict", "%s", Verdict.of(result).sentence());
        Files.createDirectories(output);
        write(example.image(), best.get(), output, out);
        return true;
    }

    /** In ASCII, since consoles and build servers may know no more. */
    private static void say(Solution solution, PrintStream out) {
        var placement = solution.placement();
        var setting = placement.setting();
        var errors = solution.errors();
        line(out, "Crystal", "%s", placement.crystal().name());
        line(out, "Zone axis", "[%s]", setting.zone());
        line(
                out,
                "Rotation",
                "%s degrees (azimuth of %s)",
                degrees(setting.rotation(), errors.rotation()),
                setting.reference());
        line(
                out,
                "Lean",
                "%s degrees to the right, %s upwards",
                degrees(setting.leanX(), errors.leanX()),
                degrees(setting.leanY(), errors.leanY()));
        line(
                out,
                "Camera constant",
                "%s px Angstrom",
                figures(placement.camera().constant(), errors.constant()));
        line(out, "Residual", "%.2f px", solution.rmsResidual());
        line(out, "Spots explained", "%d of %d", solution.matches().size(), Answer.measured(solution));
        if (solution.halfTurn().isPresent()) {
            line(out, "Not known", "which of two orientations half a turn about the zone axis apart is true");
        }
    }

    private static String degrees(double radians, double error) {
        return figures(Math.toDegrees(radians), Math.toDegrees(error));
    }

    private static String figures(double value, double error) {
        return Figures.of(new MeasuredValue(value, error), "").replace("±", "+-");
    }

    private static void line(PrintStream out, String name, String format, Object... values) {
        out.printf("%-17s%s%n", name, String.format(Locale.ROOT, format, values));
    }

    private static void write(ImagePlus image, Solution solution, Path output, PrintStream out) throws IOException {
        File picture = output.resolve("overlay.png").toFile();
        File record = output.resolve("record.cif").toFile();
        File spots = output.resolve("spots.csv").toFile();
        File report = output.resolve("report.html").toFile();
        if (!new FileSaver(image.flatten()).saveAsPng(picture.getPath())) {
            throw new IOException("picture " + picture + " can't be written");
        }
        Keep.record(solution, image, record);
        Keep.spots(solution, spots);
        Keep.report(image, report);
        line(out, "Written", "%s", picture);
        line(out, "", "%s", record);
        line(out, "", "%s, %s", spots, report.getName());
    }
}
