package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.ImagePlus;
import ij.ImageStack;
import ij.Prefs;
import ij.VirtualStack;
import ij.WindowManager;
import ij.gui.OvalRoi;
import ij.gui.Overlay;
import ij.gui.Roi;
import ij.gui.TextRoi;
import ij.gui.Toolbar;
import ij.process.ImageProcessor;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.command.ExamplePattern;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.awt.Frame;
import java.awt.image.BufferedImage;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.stream.Stream;
import javax.swing.JFrame;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * The way of the work from the opened image to the kept record and on, with every kind of image, and with the window closed
 * and opened again after each step. After each step all that is the user's is as it was.
 */
@Tag("window")
class WholeWayTest {
    /** The answer that the README states for the example. */
    private static final String ZONE = "2 1 1";

    private static final double ROTATION = 67.36;

    @TempDir
    static Path folder;

    private enum Kind {
        BITS_8,
        BITS_16,
        BITS_32,
        RGB,
        STACK,
        VIRTUAL_STACK,
        ZOOMED,
        SELECTED,
        OVERLAID
    }

    private Alarm alarm;
    private ImagePlus image;
    private JFrame frame;
    private Fingerprint user;
    private boolean closing;

    static Stream<Arguments> ways() {
        Stream<Arguments> open = Arrays.stream(Kind.values()).map(kind -> Arguments.of(kind, false));
        return Stream.concat(
                open, Stream.of(Kind.BITS_16, Kind.STACK, Kind.OVERLAID).map(k -> Arguments.of(k, true)));
    }

    @BeforeEach
    void start() {
        Screen.start();
        Screen.userFolder(folder);
        Prefs.useJFileChooser = true;
        alarm = new Alarm();
    }

    @AfterEach
    void close() {
        alarm.close();
        Prefs.useJFileChooser = false;
        Toolbar.getInstance().setTool(Toolbar.RECTANGLE);
        for (Frame table : WindowManager.getNonImageWindows()) {
            if (table.getTitle().startsWith("Spots of")) {
                Screen.onEventThread(() -> {
                    table.dispose();
                    WindowManager.removeWindow(table);
                    return null;
                });
            }
        }
        Screen.clear();
    }

    @ParameterizedTest
    @MethodSource("ways")
    void way_leadsToTheAnswer_andLeavesWhatIsTheUsers(Kind kind, boolean closedAtEachStep) throws Exception {
        closing = closedAtEachStep;
        image = Screen.show(pattern(kind));
        dress(kind);
        user = Screen.onEventThread(() -> Fingerprint.of(image));
        frame = Screen.workbench();
        Screen.await(() -> Screen.guide(frame).contains("Find the spots"));
        step("opened");

        Screen.click(frame, "Find spots");
        Screen.await(() -> sitting().measured().isPresent());
        step("spots found");

        Screen.click(frame, "Find orientation");
        Screen.await(() -> sitting().chosen().isPresent());
        assertAnswer(sitting().chosen().orElseThrow());
        step("orientation found");

        HandTool.use(HandMode.PATTERN);
        Screen.onEventThread(() -> {
            HandTool.pickUp();
            return null;
        });
        PixelPoint centre = laid().camera().centre();
        Screen.drag(image, centre.x() + 90, centre.y(), centre.x() + 90, centre.y() - 3.3);
        assertTrue(sitting().chosen().isEmpty(), "a pattern moved by hand is no solution");
        Screen.type(frame, "lean right", "0.5");
        step("corrected by hand");

        Screen.click(frame, "Refine");
        Screen.await(() -> sitting().chosen().isPresent());
        assertAnswer(sitting().chosen().orElseThrow());
        step("refined");

        String name = kind + "-" + closedAtEachStep;
        Path record = folder.resolve(name + ".cif");
        Screen.save(frame, "Record (CIF)…", record);
        assertAnswer(FitDocument.read(record).solution().orElseThrow());
        Path spots = folder.resolve(name + ".csv");
        Screen.save(frame, "Spots (CSV)…", spots);
        assertTrue(Files.readAllLines(spots).size() > 20);
        Path report = folder.resolve(name + ".html");
        Screen.save(frame, "Report (HTML)…", report);
        assertTrue(Files.readString(report).contains("</html>"));
        Screen.click(frame, "Table");
        Screen.select(image);
        step("kept");

        reopen();
        assertAnswer(sitting().chosen().orElseThrow());
        assertTrue(Screen.guide(frame).contains("keep the record"), Screen.guide(frame));
        Screen.type(frame, "rotation", "10");
        assertEquals(10, Math.toDegrees(laid().setting().rotation()), 1e-9);
        Screen.click(frame, "Undo");
        assertAnswer(sitting().chosen().orElseThrow());
        step("gone on");
    }

    private void step(String done) {
        Screen.onEventThread(() -> {
            user.assertSame(image);
            return null;
        });
        alarm.assertQuiet(done);
        if (closing) {
            Sitting before = sitting();
            reopen();
            assertEquals(before, sitting(), done);
            user.assertSame(image);
            alarm.assertQuiet(done + ", window closed and opened");
        }
    }

    private void reopen() {
        Screen.onEventThread(() -> {
            frame.dispose();
            return null;
        });
        Screen.settle();
        frame = Screen.workbench();
        Screen.await(() -> frame.getTitle().contains(image.getTitle()));
    }

    private static void assertAnswer(Solution solution) {
        ZoneSetting setting = solution.placement().setting();
        assertEquals(ZONE, setting.zone().toString());
        assertEquals(
                0,
                Math.IEEEremainder(Math.toDegrees(setting.rotation()) - ROTATION, 180),
                0.1,
                "rotation but half a turn");
    }

    private Sitting sitting() {
        return Sitting.of(image);
    }

    private Placement laid() {
        return sitting().placement().orElseThrow();
    }

    /** The example as an image of a kind, with what its microscopist knows of it. */
    private static ImagePlus pattern(Kind kind) throws Exception {
        ExamplePattern example = ExamplePattern.load();
        ImageProcessor pixels = example.image().getProcessor();
        ImagePlus made = switch (kind) {
            case BITS_8 -> new ImagePlus("8 bit", pixels.convertToByte(true));
            case BITS_32 -> new ImagePlus("32 bit", pixels.convertToFloat());
            case RGB -> new ImagePlus("RGB", pixels.convertToRGB());
            case STACK -> new ImagePlus("stack", stack(pixels));
            case VIRTUAL_STACK -> new ImagePlus("virtual", virtual(pixels));
            default -> new ImagePlus("16 bit", pixels);
        };
        new ExamplePattern(made, example.crystal(), example.kilovolts(), example.cameraConstant(), example.tolerance())
                .keep();
        return made;
    }

    private void dress(Kind kind) {
        if (kind == Kind.STACK || kind == Kind.VIRTUAL_STACK) {
            image.setSlice(2);
        }
        if (kind == Kind.ZOOMED) {
            Screen.onEventThread(() -> {
                image.getCanvas().zoomIn(250, 250);
                image.getCanvas().zoomIn(250, 250);
                return null;
            });
        }
        if (kind == Kind.SELECTED) {
            image.setRoi(new OvalRoi(20, 30, 140, 90));
        }
        if (kind == Kind.OVERLAID) {
            Overlay overlay = new Overlay(new Roi(5, 6, 70, 80));
            overlay.add(new TextRoi(30, 40, "mine"));
            image.setOverlay(overlay);
            // A text takes its size when ImageJ first paints it, which is no change of ours.
            Screen.onEventThread(() -> {
                image.getCanvas().paint(new BufferedImage(8, 8, BufferedImage.TYPE_INT_RGB).createGraphics());
                return null;
            });
        }
        Screen.settle();
    }

    private static ImageStack stack(ImageProcessor pixels) {
        ImageStack three = new ImageStack(pixels.getWidth(), pixels.getHeight());
        for (int slice = 1; slice <= 3; slice++) {
            ImageProcessor one = pixels.duplicate();
            if (slice != 2) {
                one.set(0);
            }
            three.addSlice(one);
        }
        return three;
    }

    private static ImageStack virtual(ImageProcessor pixels) {
        ImageStack three = stack(pixels);
        VirtualStack read = new VirtualStack(pixels.getWidth(), pixels.getHeight(), null, folder + "/");
        for (int slice = 1; slice <= three.size(); slice++) {
            String name = "slice" + slice + ".tif";
            IJ.saveAsTiff(
                    new ImagePlus(name, three.getProcessor(slice)),
                    folder.resolve(name).toString());
            read.addSlice(name);
        }
        return read;
    }
}
