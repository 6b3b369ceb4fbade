package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.ImageJ;
import ij.ImagePlus;
import ij.Menus;
import ij.WindowManager;
import ij.gui.GenericDialog;
import ij.plugin.frame.Recorder;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.Launch;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import io.github.zonewright.imagej.session.Sitting;
import java.awt.Button;
import java.awt.Checkbox;
import java.awt.Choice;
import java.awt.EventQueue;
import java.awt.TextField;
import java.awt.Window;
import java.awt.event.ActionEvent;
import java.util.Optional;
import java.util.function.BooleanSupplier;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

/** A menu command in plain ImageJ: menu, dialog, OK, recorder. */
@Tag("window")
class CommandDialogTest {
    private static final String LABEL = "Lay Computed Pattern...";
    private ImagePlus image;

    @BeforeEach
    @SuppressWarnings("unchecked")
    void open() {
        if (IJ.getInstance() == null) {
            new ImageJ(ImageJ.EMBEDDED);
        }
        Menus.getCommands().put(LABEL, Launch.class.getName() + "(\"command.LayPattern\")");
        image = TestPatterns.imageOfUser();
        image.show();
        await(() -> WindowManager.getCurrentImage() == image);
    }

    @AfterEach
    void close() {
        image.changes = false;
        image.close();
        Recorder.record = false;
    }

    @Test
    void menuCommand_asksAndLaysThePattern() {
        Fingerprint before = Fingerprint.of(image);
        IJ.doCommand(image, LABEL);
        GenericDialog dialog = awaitDialog();
        set(dialog, "200", "120", "1 1 0");
        press(dialog, "OK");
        await(() -> PatternOverlay.count(image) > 5);
        before.assertSame(image);
        assertEquals(200, Sitting.of(image).placement().orElseThrow().beam().kilovolts());
    }

    @Test
    void recorder_writesAMacroThatDoesTheSame() {
        Recorder recorder = new Recorder(false);
        try {
            IJ.doCommand(image, LABEL);
            GenericDialog dialog = awaitDialog();
            set(dialog, "200", "120", "1 1 0");
            press(dialog, "OK");
            await(() -> PatternOverlay.count(image) > 5
                    && Recorder.getInstance().getText().contains("scale="));
            String line = Recorder.getInstance()
                    .getText()
                    .lines()
                    .filter(l -> l.contains(LABEL))
                    .findFirst()
                    .orElseThrow();
            Sitting laid = Sitting.of(image);
            String options = line.substring(line.indexOf("\", \"") + 4, line.lastIndexOf('"'));
            assertTrue(options.contains("zone=[1 1 0]") && options.contains("mirrored=false"), options);
            Sitting.EMPTY.show(image);
            assertEquals(Optional.empty(), Launching.macro(image, "command.LayPattern", options));
            assertEquals(
                    laid.placement().orElseThrow(),
                    Sitting.of(image).placement().orElseThrow());
        } finally {
            recorder.close();
        }
    }

    @Test
    void cancel_changesNothing() {
        Fingerprint before = Fingerprint.of(image);
        IJ.doCommand(image, LABEL);
        press(awaitDialog(), "Cancel");
        IJ.wait(300);
        before.assertSame(image);
        assertEquals(0, PatternOverlay.count(image));
    }

    @Test
    void wrongValue_isSaidInTheDialogAndKeepsOkWaiting() {
        IJ.doCommand(image, LABEL);
        GenericDialog dialog = awaitDialog();
        EventQueue.invokeLater(() -> ((TextField) dialog.getStringFields().get(1)).setText("0"));
        Button ok = button(dialog, "OK");
        await(() -> !ok.isEnabled());
        EventQueue.invokeLater(() -> ((TextField) dialog.getStringFields().get(1)).setText("200"));
        await(ok::isEnabled);
        press(dialog, "Cancel");
    }

    private static void set(GenericDialog dialog, String kilovolts, String scale, String zone) {
        try {
            EventQueue.invokeAndWait(() -> {
                ((Choice) dialog.getChoices().get(0)).select("current image");
                ((Choice) dialog.getChoices().get(1)).select("Copper");
                ((TextField) dialog.getStringFields().get(1)).setText(kilovolts);
                ((TextField) dialog.getStringFields().get(2)).setText(scale);
                ((TextField) dialog.getStringFields().get(5)).setText(zone);
                ((Checkbox) dialog.getCheckboxes().get(1)).setState(true);
            });
        } catch (InterruptedException | java.lang.reflect.InvocationTargetException e) {
            throw new IllegalStateException(e);
        }
    }

    private static GenericDialog awaitDialog() {
        await(() -> dialog().isPresent() && isModalLoopEntered());
        return dialog().orElseThrow();
    }

    /**
     * Whether a thread waits for a modal dialog. A dialog is visible a moment before that, and one that is closed in that
     * moment blocks for ever.
     */
    private static boolean isModalLoopEntered() {
        return Thread.getAllStackTraces().entrySet().stream()
                .filter(e -> e.getKey().getState() == Thread.State.WAITING)
                .flatMap(e -> java.util.Arrays.stream(e.getValue()))
                .anyMatch(frame -> frame.getClassName().equals("java.awt.WaitDispatchSupport")
                        && frame.getMethodName().equals("enter"));
    }

    private static Optional<GenericDialog> dialog() {
        for (Window window : Window.getWindows()) {
            if (window instanceof GenericDialog dialog && dialog.isVisible()) {
                return Optional.of(dialog);
            }
        }
        return Optional.empty();
    }

    private static Button button(GenericDialog dialog, String label) {
        for (Button button : dialog.getButtons()) {
            if (button != null && button.getLabel().strip().equals(label)) {
                return button;
            }
        }
        throw new IllegalStateException("no button " + label);
    }

    private static void press(GenericDialog dialog, String label) {
        Button button = button(dialog, label);
        EventQueue.invokeLater(() ->
                button.dispatchEvent(new ActionEvent(button, ActionEvent.ACTION_PERFORMED, button.getActionCommand())));
        await(() -> !dialog.isVisible());
        assertFalse(dialog.isVisible());
    }

    private static void await(BooleanSupplier wanted) {
        long end = System.currentTimeMillis() + 20_000;
        while (!wanted.getAsBoolean() && System.currentTimeMillis() < end) {
            IJ.wait(20);
        }
        assertTrue(wanted.getAsBoolean(), "waited in vain");
    }
}
