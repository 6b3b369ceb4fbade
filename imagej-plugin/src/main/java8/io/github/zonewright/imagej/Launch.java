package io.github.zonewright.imagej;

import ij.IJ;
import ij.plugin.PlugIn;
import java.lang.reflect.InvocationTargetException;

/**
 * Entry point of every menu command in plain ImageJ, where {@code plugins.config} names it with the command as its
 * argument. Compiled for Java 8, and bound to the rest of Zonewright by name alone, so that an ImageJ on an old Java
 * answers with a sentence where it would otherwise show a stack trace.
 */
public final class Launch implements PlugIn {
    static final int REQUIRED_JAVA = 17;

    private static final String RUNNER = "io.github.zonewright.imagej.command.CommandRunner";

    /** Called by ImageJ. */
    public Launch() {}

    /**
     * Runs a command, or says which Java is needed.
     *
     * @param commandName the command, as written in {@code plugins.config}
     */
    @Override
    public void run(String commandName) {
        String version = System.getProperty("java.specification.version");
        if (featureVersion(version) < REQUIRED_JAVA) {
            IJ.error("Zonewright", javaTooOld(version));
            return;
        }
        try {
            Class<?> runner = Class.forName(RUNNER, true, Launch.class.getClassLoader());
            runner.getMethod("run", String.class).invoke(null, commandName);
        } catch (InvocationTargetException e) {
            throw unchecked(e.getCause());
        } catch (ReflectiveOperationException e) {
            throw new IllegalStateException("Zonewright's jar is incomplete: " + RUNNER + " cannot be called", e);
        }
    }

    /** Reads Java's feature version from {@code java.specification.version}, which was 1.8 before it became 9. */
    static int featureVersion(String specification) {
        String feature = specification.startsWith("1.") ? specification.substring(2) : specification;
        return Integer.parseInt(feature);
    }

    static String javaTooOld(String version) {
        return "Zonewright needs Java " + REQUIRED_JAVA + " or newer, and this ImageJ runs on Java " + version
                + ": please start ImageJ with a newer Java.";
    }

    /** Lets through what the command threw: ImageJ ends a macro by an unchecked exception of its own. */
    private static RuntimeException unchecked(Throwable cause) {
        if (cause instanceof Error) {
            throw (Error) cause;
        }
        return cause instanceof RuntimeException ? (RuntimeException) cause : new IllegalStateException(cause);
    }
}
