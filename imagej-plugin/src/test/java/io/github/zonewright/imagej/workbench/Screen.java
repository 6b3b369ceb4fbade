package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import ij.ImageJ;
import ij.ImagePlus;
import ij.Prefs;
import ij.WindowManager;
import ij.gui.ImageCanvas;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.session.UserFolder;
import java.awt.AWTEvent;
import java.awt.Component;
import java.awt.Container;
import java.awt.EventQueue;
import java.awt.KeyboardFocusManager;
import java.awt.Toolkit;
import java.awt.Window;
import java.awt.datatransfer.DataFlavor;
import java.awt.datatransfer.Transferable;
import java.awt.event.KeyEvent;
import java.awt.event.MouseEvent;
import java.lang.reflect.InvocationTargetException;
import java.nio.file.Path;
import java.util.List;
import java.util.concurrent.Callable;
import java.util.concurrent.FutureTask;
import java.util.function.BooleanSupplier;
import javax.swing.AbstractButton;
import javax.swing.JDialog;
import javax.swing.JFileChooser;
import javax.swing.JFrame;
import javax.swing.JLabel;
import javax.swing.JTextField;
import javax.swing.MenuElement;
import javax.swing.MenuSelectionManager;
import javax.swing.SwingUtilities;
import javax.swing.TransferHandler;

/** What the window tests share: a real ImageJ, its images, our window, and patience. */
final class Screen {
    private static final long PATIENCE_MILLISECONDS = 30_000;
    private static ImageJ imagej;

    private Screen() {}

    static void start() {
        if (imagej == null) {
            imagej = new ImageJ(ImageJ.EMBEDDED);
            Thread.setDefaultUncaughtExceptionHandler((thread, e) -> e.printStackTrace());
        }
    }

    /** Shows an image and waits until it is current. */
    static ImagePlus show(ImagePlus image) {
        image.show();
        await(() -> WindowManager.getCurrentImage() == image && image.getWindow() != null);
        return image;
    }

    static JFrame workbench() {
        return onEventThread(() -> Workbench.open().frame());
    }

    /** Closes the workbench and all images without asking. */
    static void clear() {
        onEventThread(() -> {
            for (Window window : Window.getWindows()) {
                if (window instanceof WorkbenchFrame && window.isDisplayable()) {
                    window.dispose();
                }
            }
            return null;
        });
        for (int id : WindowManager.getIDList() == null ? new int[0] : WindowManager.getIDList()) {
            ImagePlus image = WindowManager.getImage(id);
            image.changes = false;
            image.close();
        }
        settle();
    }

    static <T> T onEventThread(Callable<T> work) {
        FutureTask<T> task = new FutureTask<>(work);
        EventQueue.invokeLater(task);
        try {
            return task.get();
        } catch (Exception e) {
            throw new IllegalStateException(e);
        }
    }

    static void settle() {
        try {
            EventQueue.invokeAndWait(() -> {});
            EventQueue.invokeAndWait(() -> {});
        } catch (InterruptedException | InvocationTargetException e) {
            throw new IllegalStateException(e);
        }
    }

    static void await(BooleanSupplier wanted) {
        long end = System.currentTimeMillis() + PATIENCE_MILLISECONDS;
        while (!wanted.getAsBoolean() && System.currentTimeMillis() < end) {
            IJ.wait(20);
        }
        assertTrue(wanted.getAsBoolean(), "waited in vain");
        settle();
    }

    /**
     * Makes an image the current one and waits until it stays so: a window manager may still be bringing forward the window
     * that opened last.
     */
    static void select(ImagePlus image) {
        int steady = 0;
        long end = System.currentTimeMillis() + PATIENCE_MILLISECONDS;
        while (steady < 10 && System.currentTimeMillis() < end) {
            if (WindowManager.getCurrentImage() == image) {
                steady++;
            } else {
                steady = 0;
                WindowManager.setCurrentWindow(image.getWindow());
                image.getWindow().toFront();
            }
            IJ.wait(30);
        }
        settle();
    }

    /** A component by its name. */
    static <T extends Component> T find(Container in, String name, Class<T> type) {
        T found = search(in, name, type);
        assertTrue(found != null, "no " + type.getSimpleName() + " named " + name);
        return found;
    }

    static void type(JFrame frame, String field, String text) {
        onEventThread(() -> {
            find(frame, field, JTextField.class).setText(text);
            return null;
        });
        settle();
    }

    static void click(JFrame frame, String button) {
        AbstractButton found = find(frame, button, AbstractButton.class);
        await(found::isEnabled);
        onEventThread(() -> {
            found.doClick();
            return null;
        });
        settle();
    }

    /** Clicks on the heading of a section until it is folded, or open. */
    static void fold(JFrame frame, String heading, boolean away) {
        JLabel title = find(frame, "heading " + heading, JLabel.class);
        Section section = (Section) SwingUtilities.getAncestorOfClass(Section.class, title);
        onEventThread(() -> {
            if (section.isFolded() != away) {
                title.dispatchEvent(
                        new MouseEvent(title, MouseEvent.MOUSE_PRESSED, 0, 0, 2, 2, 1, false, MouseEvent.BUTTON1));
            }
            return null;
        });
        settle();
        assertTrue(section.isFolded() == away, heading);
    }

    /** Presses a button that asks for a file, and names one in Swing's own chooser, which ImageJ must be set to use. */
    static void save(JFrame frame, String button, Path file) {
        AbstractButton found = find(frame, button, AbstractButton.class);
        await(found::isEnabled);
        EventQueue.invokeLater(found::doClick);
        await(() -> chooser() != null);
        onEventThread(() -> {
            JFileChooser chooser = chooser();
            chooser.setSelectedFile(file.toFile());
            chooser.approveSelection();
            return null;
        });
        await(() -> chooser() == null);
    }

    private static JFileChooser chooser() {
        for (Window window : Window.getWindows()) {
            if (window instanceof JDialog dialog && dialog.isShowing()) {
                for (Component part : dialog.getContentPane().getComponents()) {
                    if (part instanceof JFileChooser chooser) {
                        return chooser;
                    }
                }
            }
        }
        return null;
    }

    /** Makes a folder that of the user's crystals, so that tests leave the person's own alone. */
    static void userFolder(Path folder) {
        Prefs.set(UserFolder.KEY, folder.toString());
    }

    /** Types a name into the field for the crystal and presses Enter, as a person does. */
    static void pick(JFrame frame, String crystal) {
        type(frame, "crystal", crystal);
        press(find(frame, "crystal", JTextField.class), KeyEvent.VK_ENTER);
    }

    /** Sends a key to a component, whatever has the focus. */
    static void press(Component to, int key) {
        onEventThread(() -> {
            for (int kind : new int[] {KeyEvent.KEY_PRESSED, KeyEvent.KEY_RELEASED}) {
                KeyEvent event = new KeyEvent(to, kind, System.currentTimeMillis(), 0, key, KeyEvent.CHAR_UNDEFINED);
                KeyboardFocusManager.getCurrentKeyboardFocusManager().redispatchEvent(to, event);
            }
            return null;
        });
        settle();
    }

    /** Sends a key with modifiers to a canvas as the system would, by way of the dispatchers. */
    static void press(ImageCanvas to, int key, int modifiers) {
        for (int kind : new int[] {KeyEvent.KEY_PRESSED, KeyEvent.KEY_RELEASED}) {
            KeyEvent event =
                    new KeyEvent(to, kind, System.currentTimeMillis(), modifiers, key, KeyEvent.CHAR_UNDEFINED);
            onEventThread(() -> {
                to.requestFocusInWindow();
                KeyboardFocusManager.getCurrentKeyboardFocusManager().dispatchEvent(event);
                return null;
            });
        }
        settle();
    }

    /** A window of ours by its name. */
    static JFrame window(String name) {
        await(() -> open(name) != null);
        return open(name);
    }

    /** A component of an open list beneath a field, or null. */
    static <T extends Component> T popup(String name, Class<T> type) {
        for (MenuElement open : MenuSelectionManager.defaultManager().getSelectedPath()) {
            if (open.getComponent() instanceof Container list) {
                return search(list, name, type);
            }
        }
        return null;
    }

    private static JFrame open(String name) {
        for (Window window : Window.getWindows()) {
            if (name.equals(window.getName()) && window.isShowing() && window instanceof JFrame frame) {
                return frame;
            }
        }
        return null;
    }

    /** Drops a file on a window. */
    static void drop(JFrame frame, Path file) {
        Transferable one = new Transferable() {
            @Override
            public DataFlavor[] getTransferDataFlavors() {
                return new DataFlavor[] {DataFlavor.javaFileListFlavor};
            }

            @Override
            public boolean isDataFlavorSupported(DataFlavor flavor) {
                return flavor.equals(DataFlavor.javaFileListFlavor);
            }

            @Override
            public Object getTransferData(DataFlavor flavor) {
                return List.of(file.toFile());
            }
        };
        boolean taken = onEventThread(() -> frame.getRootPane()
                .getTransferHandler()
                .importData(new TransferHandler.TransferSupport(frame.getRootPane(), one)));
        assertTrue(taken);
        settle();
    }

    static String guide(JFrame frame) {
        return onEventThread(
                () -> find(frame, "guide", javax.swing.JLabel.class).getText().replaceAll("<[^>]*>", ""));
    }

    /** Sends mouse events to a canvas as the system would: press, moves, release; places in image px. */
    static void drag(ImagePlus image, double x1, double y1, double x2, double y2) {
        drag(image, new PixelPoint(x1, y1), new PixelPoint(x2, y2), 0);
    }

    /** The same with modifiers held down. */
    static void drag(ImagePlus image, PixelPoint from, PixelPoint to, int modifiers) {
        ImageCanvas canvas = image.getCanvas();
        mouse(canvas, MouseEvent.MOUSE_PRESSED, from.x(), from.y(), modifiers);
        int steps = 8;
        for (int i = 1; i <= steps; i++) {
            PixelPoint at = from.plus(to.minus(from).times((double) i / steps));
            mouse(canvas, MouseEvent.MOUSE_DRAGGED, at.x(), at.y(), modifiers);
        }
        mouse(canvas, MouseEvent.MOUSE_RELEASED, to.x(), to.y(), modifiers);
        settle();
    }

    /** Clicks on a canvas at a place in image px, with modifiers held down. */
    static void clickAt(ImagePlus image, double x, double y, int modifiers) {
        mouse(image.getCanvas(), MouseEvent.MOUSE_PRESSED, x, y, modifiers);
        mouse(image.getCanvas(), MouseEvent.MOUSE_RELEASED, x, y, modifiers);
        settle();
    }

    private static void mouse(ImageCanvas canvas, int kind, double x, double y, int modifiers) {
        AWTEvent event = new MouseEvent(
                canvas,
                kind,
                System.currentTimeMillis(),
                MouseEvent.BUTTON1_DOWN_MASK | modifiers,
                canvas.screenXD(x),
                canvas.screenYD(y),
                1,
                false,
                MouseEvent.BUTTON1);
        Toolkit.getDefaultToolkit().getSystemEventQueue().postEvent(event);
        settle();
    }

    private static <T extends Component> T search(Container in, String name, Class<T> type) {
        for (Component component : in.getComponents()) {
            if (type.isInstance(component) && name.equals(component.getName())) {
                return type.cast(component);
            }
            if (component instanceof Container inner) {
                T found = search(inner, name, type);
                if (found != null) {
                    return found;
                }
            }
        }
        return null;
    }
}
