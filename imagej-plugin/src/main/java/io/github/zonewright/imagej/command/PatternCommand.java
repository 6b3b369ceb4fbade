package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import ij.WindowManager;
import java.io.IOException;
import java.util.Optional;
import org.scijava.Cancelable;
import org.scijava.command.Command;

/**
 * What our commands share: bad input ends a command with a sentence for a person, as its cancel reason, and never with an
 * exception. Fiji shows the reason; in plain ImageJ {@link CommandRunner} does.
 */
public abstract class PatternCommand implements Command, Cancelable {
    private String cancelReason;

    /** For SciJava and the launcher, which fill the parameters before they call {@link #run()}. */
    protected PatternCommand() {}

    /**
     * Does the work.
     *
     * @throws IOException if a file can't be read or written
     * @throws IllegalArgumentException if the input is wrong; its message is shown to the person
     */
    protected abstract void perform() throws IOException;

    @Override
    public final void run() {
        try {
            perform();
        } catch (IllegalArgumentException e) {
            cancel(sentence(e.getMessage()));
        } catch (IOException e) {
            cancel(sentence(Optional.ofNullable(e.getMessage()).orElse(e.toString())));
        }
    }

    @Override
    public final boolean isCanceled() {
        return cancelReason != null;
    }

    @Override
    public final void cancel(String reason) {
        cancelReason = reason == null ? "" : reason;
    }

    @Override
    public final String getCancelReason() {
        return cancelReason;
    }

    /** The image that a command was given, or else the current one. */
    static ImagePlus pattern(ImagePlus given) {
        ImagePlus pattern = given != null ? given : WindowManager.getCurrentImage();
        if (pattern == null) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        return pattern;
    }

    static String sentence(String message) {
        String text = Character.toUpperCase(message.charAt(0)) + message.substring(1);
        return text.endsWith(".") || text.endsWith("!") || text.endsWith("?") ? text : text + ".";
    }
}
