package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.Macro;
import ij.WindowManager;
import java.io.ByteArrayOutputStream;
import java.io.PrintStream;
import java.nio.charset.StandardCharsets;
import java.util.Optional;

/** Runs commands as a macro does in plain ImageJ, with no display. */
public final class Launching {
    private static final String TITLE = "Zonewright: ";

    private Launching() {}

    /** Runs a command with macro options on an image (or none); gives the error message, if there was one. With no
     * display ImageJ prints it. */
    public static Optional<String> macro(ImagePlus image, String command, String options) {
        Thread thread = Thread.currentThread();
        String name = thread.getName();
        thread.setName("Run$_" + command);
        PrintStream out = System.out;
        ByteArrayOutputStream said = new ByteArrayOutputStream();
        IJ.redirectErrorMessages(true);
        System.setOut(new PrintStream(said, true, StandardCharsets.UTF_8));
        try {
            WindowManager.setTempCurrentImage(image);
            Macro.setOptions(options);
            CommandRunner.run(command);
        } catch (RuntimeException e) {
            if (!Macro.MACRO_CANCELED.equals(e.getMessage())) {
                throw e;
            }
        } finally {
            Macro.setOptions(null);
            WindowManager.setTempCurrentImage(null);
            IJ.redirectErrorMessages(false);
            System.setOut(out);
            thread.setName(name);
        }
        return said.toString(StandardCharsets.UTF_8)
                .lines()
                .filter(line -> line.startsWith(TITLE))
                .map(line -> line.substring(TITLE.length()))
                .findFirst();
    }
}
