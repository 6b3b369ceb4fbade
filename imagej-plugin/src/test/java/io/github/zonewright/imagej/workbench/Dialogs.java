package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.gui.GenericDialog;
import java.awt.Button;
import java.awt.Dialog;
import java.awt.EventQueue;
import java.awt.Toolkit;
import java.awt.Window;
import java.awt.event.ActionEvent;
import java.awt.event.WindowEvent;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.concurrent.CountDownLatch;
import java.util.function.BooleanSupplier;
import java.util.stream.Collectors;

/** Closes whatever asks, so that no question holds up what waits for it: yes to ImageJ's Revert, and no to all else. */
final class Dialogs {
    private static final long PATIENCE_MILLISECONDS = 30_000;
    private static final int OPENING_MILLISECONDS = 60;

    /** Waits until something is so, and closes dialogs meanwhile. */
    void until(BooleanSupplier wanted) {
        long end = System.currentTimeMillis() + PATIENCE_MILLISECONDS;
        while (!wanted.getAsBoolean() && System.currentTimeMillis() < end) {
            close();
            IJ.wait(5);
        }
        assertTrue(wanted.getAsBoolean(), () -> "waited in vain; meanwhile\n" + threads());
    }

    /** Waits until the events so far are dealt with and no dialog is open. */
    void settle() {
        for (int i = 0; i < 2; i++) {
            CountDownLatch passed = new CountDownLatch(1);
            EventQueue.invokeLater(passed::countDown);
            until(() -> passed.getCount() == 0);
        }
        until(() -> !close());
    }

    private static String threads() {
        return Thread.getAllStackTraces().entrySet().stream()
                .filter(e -> e.getKey().getName().matches("user|AWT-EventQueue.*|Run\\$_.*|SwingWorker.*"))
                .map(e -> e.getKey().getName() + "\n    "
                        + Arrays.stream(e.getValue())
                                .map(StackTraceElement::toString)
                                .collect(Collectors.joining("\n    ")))
                .collect(Collectors.joining("\n"));
    }

    /** Asks each open modal dialog to close; says whether there was one. */
    private static boolean close() {
        List<Dialog> asking = new ArrayList<>();
        for (Window window : Window.getWindows()) {
            if (window instanceof Dialog dialog && dialog.isShowing() && dialog.isModal()) {
                asking.add(dialog);
            }
        }
        if (asking.isEmpty()) {
            return false;
        }
        // A dialog that is closed while it opens keeps AWT waiting for it.
        IJ.wait(OPENING_MILLISECONDS);
        EventQueue events = Toolkit.getDefaultToolkit().getSystemEventQueue();
        for (Dialog dialog : asking) {
            if (dialog instanceof GenericDialog question && dialog.getTitle().startsWith("Revert")) {
                Button yes = question.getButtons()[0];
                events.postEvent(new ActionEvent(yes, ActionEvent.ACTION_PERFORMED, yes.getLabel()));
            } else {
                events.postEvent(new WindowEvent(dialog, WindowEvent.WINDOW_CLOSING));
            }
        }
        IJ.wait(OPENING_MILLISECONDS);
        return true;
    }
}
