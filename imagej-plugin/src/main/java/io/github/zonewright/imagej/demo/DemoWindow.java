package io.github.zonewright.imagej.demo;

import java.awt.GraphicsEnvironment;
import java.awt.HeadlessException;
import java.io.File;
import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.TimeUnit;

/**
 * Opens ImageJ with example and workbench in a process of its own, so that closing it ends nothing else. Whether a display
 * answers is tried in a process of its own too, since a display that is named but dead can block or end the one that asks.
 */
final class DemoWindow {
    private static final int SECONDS = 15;

    private DemoWindow() {}

    /** Opens the window; returns a sentence on what came of it. */
    static String open(Path output) {
        try {
            if (!displayAnswers()) {
                return "No display answers, so no window was opened.";
            }
            File log = output.resolve("window.log").toFile();
            new ProcessBuilder(java("-Djava.awt.headless=false", DemoSession.class.getName()))
                    .redirectErrorStream(true)
                    .redirectOutput(log)
                    .redirectInput(nothing())
                    .start();
            return "ImageJ opens with the example and the workbench (its messages: " + log + ").";
        } catch (IOException e) {
            return "The window could not be opened: " + e.getMessage();
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            return "The window was not opened.";
        }
    }

    private static boolean displayAnswers() throws IOException, InterruptedException {
        Process probe = new ProcessBuilder(java("-Djava.awt.headless=false", Probe.class.getName()))
                .redirectErrorStream(true)
                .redirectOutput(ProcessBuilder.Redirect.DISCARD)
                .redirectInput(nothing())
                .start();
        if (!probe.waitFor(SECONDS, TimeUnit.SECONDS)) {
            probe.destroyForcibly();
            return false;
        }
        return probe.exitValue() == 0;
    }

    private static File nothing() {
        return new File(System.getProperty("os.name").startsWith("Windows") ? "NUL" : "/dev/null");
    }

    private static List<String> java(String... arguments) {
        List<String> command = new ArrayList<>();
        command.add(Path.of(System.getProperty("java.home"), "bin", "java").toString());
        command.add("-cp");
        command.add(System.getProperty("java.class.path"));
        command.addAll(List.of(arguments));
        return command;
    }

    /** Asks the display for its screens; ends with 0 when it answers. */
    static final class Probe {
        private Probe() {}

        /**
         * Tries the display.
         *
         * @param arguments none
         */
        public static void main(String[] arguments) {
            try {
                boolean answers =
                        GraphicsEnvironment.getLocalGraphicsEnvironment().getScreenDevices().length > 0;
                System.exit(answers ? 0 : 1);
            } catch (HeadlessException | java.awt.AWTError e) {
                System.exit(1);
            }
        }
    }
}
