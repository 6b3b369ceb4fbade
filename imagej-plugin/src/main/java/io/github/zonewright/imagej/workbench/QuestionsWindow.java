package io.github.zonewright.imagej.workbench;

import java.awt.Component;
import java.awt.Dimension;
import javax.swing.BorderFactory;
import javax.swing.JComponent;
import javax.swing.JFrame;
import javax.swing.JScrollPane;
import javax.swing.JTabbedPane;

/** A small window beside the workbench for what can be asked about an answer. */
final class QuestionsWindow extends JFrame {
    private static final long serialVersionUID = 1L;
    private static final Dimension SIZE = new Dimension(600, 500);

    /** Room left below the window, which comes up low so that it leaves the image free. */
    private static final int BELOW = 50;

    private final JTabbedPane tabs = new JTabbedPane();
    private final LeftoverPanel leftover = new LeftoverPanel();
    private final ApartPanel apart = new ApartPanel();
    private final ClicksPanel clicks = new ClicksPanel();

    QuestionsWindow() {
        super("About the answer");
        setName("questions window");
        tabs.setName("questions");
        tabs.setFont(Looks.text());
        tabs.addTab("Left over", leftover);
        tabs.addTab("What tells apart", apart);
        tabs.addTab("By clicks", clicks);
        add(tabs);
        setDefaultCloseOperation(HIDE_ON_CLOSE);
        setSize(SIZE);
    }

    LeftoverPanel leftover() {
        return leftover;
    }

    ApartPanel apart() {
        return apart;
    }

    ClicksPanel clicks() {
        return clicks;
    }

    /** Is told when another part comes to the front. */
    void onTurn(Runnable listener) {
        tabs.addChangeListener(e -> listener.run());
    }

    /** Comes up with one of its parts in front. */
    void open(Component part, Component owner) {
        tabs.setSelectedComponent(part);
        if (!isVisible()) {
            Looks.beside(owner, this);
            int bottom = getGraphicsConfiguration().getBounds().height - getHeight() - BELOW;
            setLocation(getX(), Math.max(getY(), bottom));
        }
        toFront();
    }

    static void pad(JComponent panel) {
        panel.setBorder(BorderFactory.createEmptyBorder(Looks.GAP, Looks.MARGIN, Looks.GAP, Looks.MARGIN));
    }

    static JScrollPane scroll(Component part) {
        JScrollPane pane = new JScrollPane(part);
        pane.setBorder(BorderFactory.createEmptyBorder());
        pane.setHorizontalScrollBarPolicy(JScrollPane.HORIZONTAL_SCROLLBAR_NEVER);
        return pane;
    }
}
