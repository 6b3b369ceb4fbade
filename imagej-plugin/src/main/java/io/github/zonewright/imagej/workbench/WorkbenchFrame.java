package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.imagej.command.CommandRunner;
import java.awt.BorderLayout;
import java.awt.Dimension;
import java.awt.GraphicsConfiguration;
import java.awt.Insets;
import java.awt.Rectangle;
import java.awt.Toolkit;
import java.awt.Window;
import java.awt.event.ActionEvent;
import java.awt.event.InputEvent;
import java.awt.event.KeyEvent;
import java.awt.event.WindowAdapter;
import java.awt.event.WindowEvent;
import java.io.File;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import javax.swing.AbstractAction;
import javax.swing.BorderFactory;
import javax.swing.Box;
import javax.swing.JButton;
import javax.swing.JComponent;
import javax.swing.JFrame;
import javax.swing.JLabel;
import javax.swing.JPanel;
import javax.swing.KeyStroke;

/** The frame around the sections: the next thing to do on top, then the way of the work from top to bottom. */
final class WorkbenchFrame extends JFrame {
    private static final long serialVersionUID = 1L;
    private static final int WIDTH = 500;

    /** With a task bar it fits on a screen of 1080 px, or of a laptop's 900. */
    private static final int HEIGHT = 860;

    /** Room for the scroll bar, which comes when a section grows. */
    private static final int SCROLL_BAR = 16;

    private final SpotsSection spots;
    private final SolutionsSection solutions;
    private final HandSection hand;
    private final KeepSection keep;
    private final InstrumentSection instrument;
    private final SectionStack sections;
    private final JLabel guide = new JLabel();
    private final JButton example = new JButton("Open example");
    private Guide.Step step = Guide.Step.OPEN;

    WorkbenchFrame(
            InstrumentSection instrument,
            CrystalSection crystal,
            SpotsSection spots,
            SolutionsSection solutions,
            HandSection hand,
            SeeingSection seeing,
            KeepSection keep) {
        super("Zonewright");
        this.spots = spots;
        this.solutions = solutions;
        this.hand = hand;
        this.keep = keep;
        this.instrument = instrument;
        this.sections = new SectionStack(
                List.of(instrument, crystal, spots, solutions, hand, seeing, keep),
                List.of(instrument, crystal, spots, solutions, keep));
        setDefaultCloseOperation(DISPOSE_ON_CLOSE);
        guide.setName("guide");
        guide.setFont(Looks.text().deriveFont(13f));
        guide.setForeground(Looks.GUIDE_INK);
        guide.setBorder(BorderFactory.createEmptyBorder(9, Looks.MARGIN, 9, Looks.MARGIN));
        example.setName("Open example");
        example.setFont(Looks.text());
        example.setToolTipText("Opens the pattern that comes with Zonewright, with its instrument and crystal");
        example.addActionListener(e -> {
            Recording.of("Open Example Pattern", List.of());
            CommandRunner.start("command.OpenExample");
        });
        JPanel top = Section.line(guide, Box.createHorizontalGlue(), example, Box.createHorizontalStrut(Looks.GAP));
        top.setBackground(Looks.GUIDE_GROUND);
        add(top, BorderLayout.NORTH);
        add(sections, BorderLayout.CENTER);
        key(KeyEvent.VK_F1, 0, "help", () -> Section.helpOn(getFocusOwner()));
    }

    /** Shows the window to the right of an image, or left of it where there is more room. */
    void place(Optional<ImagePlus> image) {
        pack();
        GraphicsConfiguration screen = getGraphicsConfiguration();
        Rectangle all = screen.getBounds();
        Insets taken = Toolkit.getDefaultToolkit().getScreenInsets(screen);
        int height = Math.min(HEIGHT, all.height - taken.top - taken.bottom - 40);
        setSize(new Dimension(Math.max(WIDTH, getWidth()) + SCROLL_BAR, height));
        Rectangle beside =
                image.map(ImagePlus::getWindow).map(Window::getBounds).orElse(new Rectangle(40, 60, 0, 0));
        int right = beside.x + beside.width + Looks.GAP;
        int x = right + getWidth() <= all.x + all.width ? right : Math.max(all.x, beside.x - getWidth() - Looks.GAP);
        setLocation(x, Math.max(all.y + taken.top, Math.min(beside.y, all.y + all.height - height - 30)));
        setVisible(true);
    }

    /** Says the next thing to do, and lets Enter do it. */
    void guide(Optional<String> image, Guide next) {
        example.setVisible(next.step() == Guide.Step.OPEN);
        int room = WIDTH
                - 2 * Looks.MARGIN
                - 10
                - (example.isVisible() ? example.getPreferredSize().width + 3 * Looks.GAP : 0);
        guide.setText(Looks.wrapped(next.sentence(), room));
        setTitle(image.map(title -> "Zonewright: " + title).orElse("Zonewright"));
        JButton button = switch (next.step()) {
            case OPEN -> example;
            case FIND_SPOTS -> spots.findSpots();
            case FIND_ORIENTATION -> solutions.findOrientation();
            case REFINE -> hand.refine();
            case KEEP -> keep.record();
            default -> null;
        };
        getRootPane().setDefaultButton(button);
        switch (next.step()) {
            case OPEN -> sections.nothingNext();
            case PUT_RIGHT -> sections.next(instrument, Optional.empty(), true);
            case FIND_SPOTS -> sections.next(spots, Optional.empty(), true);
            case FIND_ORIENTATION -> sections.next(solutions, Optional.empty(), true);
            case LAY, REFINE -> sections.next(hand, Optional.empty(), false);
            case KEEP -> sections.next(keep, Optional.of(solutions), false);
            // Nothing moves while a search runs.
            case WAIT -> {}
        }
        if (button != null && next.step() != step && button.getParent() instanceof JComponent line) {
            sections.validate();
            line.scrollRectToVisible(button.getBounds());
        }
        step = next.step();
    }

    void onUndo(Runnable action) {
        key(KeyEvent.VK_Z, Toolkit.getDefaultToolkit().getMenuShortcutKeyMaskEx(), "undo", action);
        key(KeyEvent.VK_Z, InputEvent.CTRL_DOWN_MASK, "undo", action);
    }

    void onStop(Runnable action) {
        key(KeyEvent.VK_ESCAPE, 0, "stop", action);
    }

    /** Takes a file that is dropped anywhere on the window. */
    void onDrop(Consumer<File> action) {
        getRootPane().setTransferHandler(new FileDrop(action));
    }

    void onClose(Runnable action) {
        addWindowListener(new WindowAdapter() {
            @Override
            public void windowClosed(WindowEvent e) {
                action.run();
            }
        });
    }

    private void key(int code, int modifiers, String name, Runnable action) {
        getRootPane()
                .getInputMap(JComponent.WHEN_ANCESTOR_OF_FOCUSED_COMPONENT)
                .put(KeyStroke.getKeyStroke(code, modifiers), name);
        getRootPane().getActionMap().put(name, new AbstractAction() {
            private static final long serialVersionUID = 1L;

            @Override
            public void actionPerformed(ActionEvent e) {
                action.run();
            }
        });
    }
}
