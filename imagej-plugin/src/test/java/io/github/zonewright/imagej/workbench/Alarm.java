package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;

import ij.IJ;
import java.io.ByteArrayOutputStream;
import java.io.OutputStream;
import java.io.PrintStream;
import java.io.PrintWriter;
import java.io.StringWriter;
import java.nio.charset.StandardCharsets;
import java.util.List;
import java.util.concurrent.CopyOnWriteArrayList;
import java.util.regex.Pattern;

/** Hears whatever goes wrong out of sight: what reaches ImageJ's console or log, any thread's end, and the error stream. */
final class Alarm implements AutoCloseable {
    private static final Pattern TRACE = Pattern.compile("(?m)^\\s+at [\\w.$/]+\\(|\\b\\w+(Exception|Error)\\b");

    private final List<String> heard = new CopyOnWriteArrayList<>();
    private final PrintStream err = System.err;
    private final Thread.UncaughtExceptionHandler before = Thread.getDefaultUncaughtExceptionHandler();
    private final ByteArrayOutputStream copy = new ByteArrayOutputStream();

    Alarm() {
        System.setErr(new PrintStream(new Tee(), true, StandardCharsets.UTF_8));
        Thread.setDefaultUncaughtExceptionHandler((thread, e) -> heard.add(thread.getName() + ": " + trace(e)));
        IJ.setExceptionHandler(e -> heard.add("ImageJ: " + trace(e)));
    }

    /** Checks that nothing was heard. */
    void assertQuiet(String when) {
        String said;
        synchronized (copy) {
            said = copy.toString(StandardCharsets.UTF_8);
            copy.reset();
        }
        if (TRACE.matcher(said).find()) {
            heard.add("error stream: " + said);
        }
        String log = IJ.getLog();
        if (log != null && TRACE.matcher(log).find()) {
            heard.add("log: " + log);
        }
        assertEquals(List.of(), heard, when);
    }

    @Override
    public void close() {
        System.setErr(err);
        Thread.setDefaultUncaughtExceptionHandler(before);
        IJ.setExceptionHandler(null);
    }

    private static String trace(Throwable e) {
        StringWriter text = new StringWriter();
        e.printStackTrace(new PrintWriter(text));
        return text.toString();
    }

    /** Keeps what passes. */
    private final class Tee extends OutputStream {
        @Override
        public void write(int value) {
            err.write(value);
            synchronized (copy) {
                copy.write(value);
            }
        }
    }
}
