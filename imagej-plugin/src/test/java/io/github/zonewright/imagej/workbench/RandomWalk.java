package io.github.zonewright.imagej.workbench;

import ij.IJ;
import ij.ImagePlus;
import ij.Undo;
import ij.WindowManager;
import ij.gui.OvalRoi;
import ij.gui.Overlay;
import ij.gui.PlotWindow;
import ij.gui.Roi;
import ij.gui.Toolbar;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.overlay.PatternOverlay;
import java.awt.Component;
import java.awt.Container;
import java.awt.EventQueue;
import java.awt.Toolkit;
import java.awt.Window;
import java.awt.event.InputEvent;
import java.awt.event.KeyEvent;
import java.awt.event.MouseEvent;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.IdentityHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import javax.swing.AbstractButton;
import javax.swing.JComponent;
import javax.swing.JFrame;
import javax.swing.JTable;
import javax.swing.MenuElement;
import javax.swing.MenuSelectionManager;
import javax.swing.text.JTextComponent;

/** One step after the other of a person who does not look where they are going. */
final class RandomWalk implements AutoCloseable {
    private static final int MOST_IMAGES = 4;
    private static final int TOLD = 60;
    private static final String TYPED = "0123456789.- ,eAlu";
    private static final int[] KEYS = {
        KeyEvent.VK_ENTER, KeyEvent.VK_ESCAPE, KeyEvent.VK_UP, KeyEvent.VK_DOWN, KeyEvent.VK_BACK_SPACE, KeyEvent.VK_F1
    };
    private static final int[] MODIFIERS = {0, 0, 0, InputEvent.SHIFT_DOWN_MASK, InputEvent.ALT_DOWN_MASK};

    /** What a button does that the user means: the image's calibration, or the selection, is another one then. */
    private static final List<String> MEANT = List.of("Set image calibration", "Put it back");

    private final long seed;
    private final Random random;
    private final Path folder;
    private final Alarm alarm = new Alarm();
    private final Dialogs dialogs = new Dialogs();
    private final List<String> steps = new ArrayList<>();
    private final Map<ImagePlus, Fingerprint> users = new IdentityHashMap<>();

    RandomWalk(long seed, Path folder) {
        this.seed = seed;
        this.random = new Random(seed);
        this.folder = folder;
        open();
        onEventThread(Workbench::open);
        check();
    }

    /** Takes a step, and checks what it left. */
    void step() {
        try {
            switch (random.nextInt(24)) {
                case 0, 1, 2, 3, 4, 5 -> press();
                case 6, 7, 8 -> type();
                case 9, 10, 11, 12 -> drag();
                case 13 -> row();
                case 14 -> menu();
                case 15 -> workbench();
                case 16, 17 -> see();
                default -> change();
            }
            check();
        } catch (AssertionError | RuntimeException e) {
            throw new AssertionError(
                    "seed " + seed + ", step " + steps.size() + "; the last steps:\n  "
                            + String.join("\n  ", steps.subList(Math.max(0, steps.size() - TOLD), steps.size())),
                    e);
        }
    }

    /** How far the walk went. */
    String summary() {
        return "Random walk with seed " + seed + ": " + steps.size() + " steps, nothing broken.";
    }

    @Override
    public void close() {
        onEventThread(HelpWindow::close);
        alarm.close();
    }

    private void check() {
        dialogs.settle();
        onEventThread(() -> users.forEach((image, was) -> {
            if (image.getWindow() != null) {
                hideArrows(image);
                was.assertSame(image);
            }
        }));
        alarm.assertQuiet(steps.isEmpty() ? "start" : steps.get(steps.size() - 1));
    }

    private void press() {
        List<AbstractButton> buttons = parts(AbstractButton.class);
        if (buttons.isEmpty()) {
            return;
        }
        AbstractButton button = pick(buttons);
        told("press " + button.getText() + " (" + button.getName() + ")");
        click(button, 0);
        dialogs.settle();
        if (MEANT.contains(button.getText())) {
            remember();
        }
    }

    private void type() {
        List<JTextComponent> fields = parts(JTextComponent.class);
        if (fields.isEmpty()) {
            return;
        }
        JTextComponent field = pick(fields);
        if (random.nextInt(3) == 0) {
            int key = KEYS[random.nextInt(KEYS.length)];
            told("key " + KeyEvent.getKeyText(key) + " in " + field.getName());
            key(field, KeyEvent.KEY_PRESSED, 0, key, KeyEvent.CHAR_UNDEFINED);
            key(field, KeyEvent.KEY_RELEASED, 0, key, KeyEvent.CHAR_UNDEFINED);
        } else if (random.nextInt(4) == 0) {
            told("Ctrl+Z in " + field.getName());
            key(field, KeyEvent.KEY_PRESSED, InputEvent.CTRL_DOWN_MASK, KeyEvent.VK_Z, 'Z');
        } else {
            char c = TYPED.charAt(random.nextInt(TYPED.length()));
            told("type " + c + " into " + field.getName());
            key(field, KeyEvent.KEY_TYPED, 0, KeyEvent.VK_UNDEFINED, c);
        }
    }

    private void row() {
        for (JTable table : parts(JTable.class)) {
            if (table.getRowCount() > 0) {
                told("row of " + table.getName());
                click(table, 0);
            }
        }
    }

    /** An entry of a list or menu that stands open, or a click beside it. */
    private void menu() {
        List<AbstractButton> entries = new ArrayList<>();
        for (MenuElement open : MenuSelectionManager.defaultManager().getSelectedPath()) {
            if (open.getComponent() instanceof Container list) {
                collect(list, AbstractButton.class, entries);
            }
        }
        if (entries.isEmpty()) {
            return;
        }
        AbstractButton entry = pick(entries);
        told("entry " + entry.getText());
        EventQueue.invokeLater(() -> {
            entry.doClick();
            MenuSelectionManager.defaultManager().clearSelectedPath();
        });
        dialogs.settle();
        remember();
    }

    private void drag() {
        Optional<ImagePlus> on = image();
        if (on.isEmpty()) {
            return;
        }
        ImagePlus image = on.get();
        boolean ours = Toolbar.getToolName().equals(HandTool.NAME);
        int modifiers = MODIFIERS[random.nextInt(MODIFIERS.length)];
        double x = random.nextDouble() * image.getWidth();
        double y = random.nextDouble() * image.getHeight();
        boolean far = random.nextBoolean();
        told("drag on " + image.getTitle() + (ours ? " with " + HandTool.mode() : " with " + Toolbar.getToolName())
                + (modifiers == 0 ? "" : " and " + InputEvent.getModifiersExText(modifiers))
                + (far ? "" : ", a click"));
        mouse(image, MouseEvent.MOUSE_MOVED, x, y, 0);
        mouse(image, MouseEvent.MOUSE_PRESSED, x, y, modifiers);
        for (int i = 0; far && i < 5; i++) {
            x += 20 * random.nextGaussian();
            y += 20 * random.nextGaussian();
            mouse(image, MouseEvent.MOUSE_DRAGGED, x, y, modifiers);
        }
        mouse(image, MouseEvent.MOUSE_RELEASED, x, y, modifiers);
        dialogs.settle();
        if (!ours) {
            remember();
        }
    }

    /** Changes of what is seen alone: the window of the workbench, the tool, zoom, slice, the image in front. */
    private void workbench() {
        if (random.nextInt(3) == 0) {
            told("close the workbench and other windows of ours");
            onEventThread(() -> windows().forEach(Window::dispose));
        } else {
            told("open the workbench");
        }
        dialogs.settle();
        onEventThread(Workbench::open);
    }

    private void see() {
        Optional<ImagePlus> on = image();
        if (on.isEmpty()) {
            return;
        }
        ImagePlus image = on.get();
        switch (random.nextInt(5)) {
            case 0 -> {
                told("zoom " + image.getTitle());
                boolean in = random.nextBoolean() && image.getCanvas().getMagnification() < 4;
                onEventThread(() -> {
                    if (in) {
                        image.getCanvas().zoomIn(40, 40);
                    } else {
                        image.getCanvas().zoomOut(40, 40);
                    }
                });
            }
            case 1 -> {
                told("another slice of " + image.getTitle());
                user(() -> image.setSlice(1 + random.nextInt(image.getStackSize())));
                // Each slice has a display range that ImageJ sets as it comes to it.
                remember();
            }
            case 2 -> {
                told("another image in front");
                List<ImagePlus> all = images();
                ImagePlus front = all.isEmpty() ? image : pick(all);
                onEventThread(() -> WindowManager.setCurrentWindow(front.getWindow()));
            }
            case 3 -> {
                told("hand tool");
                onEventThread(HandTool::pickUp);
            }
            default -> {
                told("rectangle tool");
                onEventThread(() -> Toolbar.getInstance().setTool(Toolbar.RECTANGLE));
            }
        }
    }

    /** Changes that the user makes to images; what they leave is what has to stay from then on. */
    private void change() {
        Optional<ImagePlus> on = image();
        if (on.isEmpty()) {
            open();
            return;
        }
        ImagePlus image = on.get();
        int which = random.nextInt(12);
        told("change " + which + " of " + image.getTitle());
        switch (which) {
            case 0 -> open();
            case 1 -> close(image);
            case 2 ->
                user(() -> {
                    if (images().size() < MOST_IMAGES) {
                        image.duplicate().show();
                    }
                });
            case 3 ->
                user(() -> {
                    image.setRoi(
                            new Roi(10, 10, Math.max(64, image.getWidth() - 30), Math.max(64, image.getHeight() - 40)));
                    IJ.run(image, "Crop", "");
                });
            case 4 -> user(image::revert);
            case 5 -> user(() -> foreign(image));
            case 6 -> user(() -> image.setRoi(new OvalRoi(random.nextInt(60), random.nextInt(60), 30, 40)));
            case 7 -> user(image::deleteRoi);
            case 8 -> user(() -> image.setOverlay(null));
            case 9 -> user(() -> onEventThread(Undo::undo));
            case 10 -> user(() -> image.setHideOverlay(!image.getHideOverlay()));
            default -> user(() -> image.setTitle("renamed " + random.nextInt(100)));
        }
        remember();
    }

    private void foreign(ImagePlus image) {
        Overlay overlay = image.getOverlay() == null ? new Overlay() : image.getOverlay();
        for (int i = overlay.size() - 1; i >= 0 && random.nextBoolean(); i--) {
            if (!PatternOverlay.isOurs(overlay.get(i))) {
                overlay.remove(i);
            }
        }
        overlay.add(new Roi(random.nextInt(50), random.nextInt(50), 20, 20));
        image.setOverlay(overlay);
    }

    private void open() {
        told("open an image");
        user(() -> {
            if (images().size() >= MOST_IMAGES) {
                return;
            }
            ImagePlus made = TestPatterns.imageOfUser();
            if (random.nextInt(3) == 0) {
                ij.ImageStack stack = made.getStack();
                stack.addSlice(made.getProcessor().duplicate());
                made.setStack(stack);
            }
            Path file = folder.resolve("pattern" + random.nextInt(1000) + ".tif");
            IJ.saveAsTiff(made, file.toString());
            IJ.openImage(file.toString()).show();
        });
        remember();
    }

    private void close(ImagePlus image) {
        user(() -> {
            image.changes = false;
            image.close();
        });
        users.remove(image);
    }

    /** Runs what a user does away from the event thread, as ImageJ runs menu commands, and answers dialogs meanwhile. */
    private void user(Runnable act) {
        Thread thread = new Thread(act, "user");
        thread.start();
        dialogs.until(() -> !thread.isAlive());
    }

    /** Takes all images as they are now for what the user has. */
    private void remember() {
        dialogs.settle();
        onEventThread(() -> {
            users.clear();
            for (ImagePlus image : images()) {
                hideArrows(image);
                users.put(image, Fingerprint.of(image));
            }
        });
    }

    /** Takes away the arrows that ImageJ itself lays over a plot while the pointer is at its axes, see PlotArrowsTest. */
    private static void hideArrows(ImagePlus image) {
        if (image.getWindow() instanceof PlotWindow plot) {
            plot.hideRangeArrows();
        }
    }

    private Optional<ImagePlus> image() {
        return Optional.ofNullable(WindowManager.getCurrentImage()).filter(i -> i.getCanvas() != null);
    }

    private static List<ImagePlus> images() {
        List<ImagePlus> open = new ArrayList<>();
        for (int id : WindowManager.getIDList() == null ? new int[0] : WindowManager.getIDList()) {
            ImagePlus image = WindowManager.getImage(id);
            if (image != null && image.getWindow() != null) {
                open.add(image);
            }
        }
        return open;
    }

    private static List<Window> windows() {
        List<Window> ours = new ArrayList<>();
        for (Window window : Window.getWindows()) {
            if (window instanceof JFrame
                    && window.isShowing()
                    && window.getClass().getName().startsWith("io.github.zonewright")) {
                ours.add(window);
            }
        }
        return ours;
    }

    /** The parts of a kind that a person could reach now. */
    private static <T extends JComponent> List<T> parts(Class<T> type) {
        List<T> found = new ArrayList<>();
        onEventThread(() -> windows().forEach(window -> collect(window, type, found)));
        return found;
    }

    private static <T extends JComponent> void collect(Container in, Class<T> type, List<T> found) {
        for (Component part : in.getComponents()) {
            if (type.isInstance(part) && part.isShowing() && part.isEnabled()) {
                found.add(type.cast(part));
            }
            if (part instanceof Container inner) {
                collect(inner, type, found);
            }
        }
    }

    private void click(Component on, int modifiers) {
        int x = random.nextInt(Math.max(1, on.getWidth()));
        int y = random.nextInt(Math.max(1, on.getHeight()));
        for (int kind : new int[] {MouseEvent.MOUSE_PRESSED, MouseEvent.MOUSE_RELEASED, MouseEvent.MOUSE_CLICKED}) {
            int down = kind == MouseEvent.MOUSE_PRESSED ? InputEvent.BUTTON1_DOWN_MASK : 0;
            post(new MouseEvent(
                    on, kind, System.currentTimeMillis(), modifiers | down, x, y, 1, false, MouseEvent.BUTTON1));
        }
    }

    private static void mouse(ImagePlus image, int kind, double x, double y, int modifiers) {
        if (image.getCanvas() == null) {
            return;
        }
        boolean none = kind == MouseEvent.MOUSE_MOVED;
        post(new MouseEvent(
                image.getCanvas(),
                kind,
                System.currentTimeMillis(),
                modifiers | (none ? 0 : InputEvent.BUTTON1_DOWN_MASK),
                image.getCanvas().screenXD(x),
                image.getCanvas().screenYD(y),
                none ? 0 : 1,
                false,
                none ? MouseEvent.NOBUTTON : MouseEvent.BUTTON1));
    }

    private static void key(Component on, int kind, int modifiers, int key, char c) {
        EventQueue.invokeLater(() -> java.awt.KeyboardFocusManager.getCurrentKeyboardFocusManager()
                .redispatchEvent(on, new KeyEvent(on, kind, System.currentTimeMillis(), modifiers, key, c)));
    }

    private static void post(MouseEvent event) {
        Toolkit.getDefaultToolkit().getSystemEventQueue().postEvent(event);
    }

    private static void onEventThread(Runnable work) {
        Screen.onEventThread(() -> {
            work.run();
            return null;
        });
    }

    private <T> T pick(List<T> from) {
        return from.get(random.nextInt(from.size()));
    }

    private void told(String step) {
        steps.add(step);
    }
}
