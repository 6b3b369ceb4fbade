package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import java.awt.Dialog;
import java.awt.EventQueue;
import java.awt.Toolkit;
import java.awt.Window;
import java.awt.event.WindowEvent;
import java.util.Arrays;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.TimeUnit;
import java.util.function.BooleanSupplier;
import java.util.stream.Collectors;

/** Closes whatever asks, as a person does who did not mean it, so that no question holds up what waits for it. */
final class Dialogs {
    private static final long PATIENCE_MILLISECONDS = 30_000;

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
        boolean any = false;
        for (Window window : Window.getWindows()) {
            if (window instanceof Dialog dialog && dialog.isShowing() && dialog.isModal()) {
                any = true;
                Toolkit.getDefaultToolkit()
                        .getSystemEventQueue()
                        .postEvent(new WindowEvent(dialog, WindowEvent.WINDOW_CLOSING));
            }
        }
        if (any) {
            try {
                TimeUnit.MILLISECONDS.sleep(10);
            } catch (InterruptedException e) {
                Thread.currentThread().interrupt();
            }
        }
        return any;
    }
}
