package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.session.CrystalOffer;
import io.github.zonewright.imagej.session.CrystalOffers;
import java.awt.BorderLayout;
import java.awt.Component;
import java.awt.Dimension;
import java.awt.event.ActionEvent;
import java.awt.event.FocusAdapter;
import java.awt.event.FocusEvent;
import java.awt.event.KeyEvent;
import java.awt.event.MouseAdapter;
import java.awt.event.MouseEvent;
import java.util.List;
import java.util.function.Consumer;
import java.util.function.Supplier;
import javax.swing.AbstractAction;
import javax.swing.BorderFactory;
import javax.swing.DefaultListModel;
import javax.swing.JLabel;
import javax.swing.JList;
import javax.swing.JPanel;
import javax.swing.JPopupMenu;
import javax.swing.JScrollPane;
import javax.swing.JTextField;
import javax.swing.KeyStroke;
import javax.swing.ListCellRenderer;
import javax.swing.ListSelectionModel;
import javax.swing.event.DocumentEvent;
import javax.swing.event.DocumentListener;

/**
 * A field to type a name or formula into, with what it may mean in a list beneath. Enter or a click picks; Escape, or
 * going elsewhere, brings back what was picked before.
 */
final class CrystalPicker extends JTextField {
    private static final long serialVersionUID = 1L;
    private static final int ROWS = 10;

    private final DefaultListModel<CrystalOffer> model = new DefaultListModel<>();
    private final JList<CrystalOffer> list = new JList<>(model);
    private final JLabel note = Looks.quiet(" ");
    private final JPopupMenu popup = new JPopupMenu();
    private final JScrollPane pane = new JScrollPane(list);
    private transient Supplier<CrystalOffers> source = () -> new CrystalOffers(List.of(), List.of());
    private transient CrystalOffers offers = source.get();
    private transient Consumer<CrystalOffer> onPick = offer -> {};
    private String picked = "";
    private boolean quiet;

    CrystalPicker() {
        setName("crystal");
        setFont(Looks.text());
        setToolTipText("Type a name or a formula; Enter takes the marked line");
        list.setName("crystal offers");
        list.setFont(Looks.text());
        list.setFocusable(false);
        list.setSelectionMode(ListSelectionModel.SINGLE_SELECTION);
        list.setCellRenderer(new OfferCell());
        list.setFixedCellHeight(20);
        pane.setBorder(BorderFactory.createEmptyBorder());
        pane.getVerticalScrollBar().setFocusable(false);
        note.setName("crystal troubles");
        note.setBorder(BorderFactory.createEmptyBorder(2, Looks.GAP, 2, Looks.GAP));
        popup.setFocusable(false);
        popup.setLayout(new BorderLayout());
        popup.add(pane, BorderLayout.CENTER);
        popup.add(note, BorderLayout.SOUTH);
        listen();
        key(KeyEvent.VK_DOWN, "down", () -> move(1), false);
        key(KeyEvent.VK_UP, "up", () -> move(-1), true);
        key(KeyEvent.VK_PAGE_DOWN, "page down", () -> move(ROWS), true);
        key(KeyEvent.VK_PAGE_UP, "page up", () -> move(-ROWS), true);
        key(KeyEvent.VK_ENTER, "pick", this::pick, true);
        key(KeyEvent.VK_ESCAPE, "back", this::back, true);
    }

    /** Where the offers come from; asked whenever the list opens. */
    void source(Supplier<CrystalOffers> from) {
        source = from;
    }

    void onPick(Consumer<CrystalOffer> listener) {
        onPick = listener;
    }

    /** Shows the name of what is picked. */
    void show(String name) {
        picked = name;
        back();
    }

    /** The name of what was picked or shown last. */
    String shown() {
        return picked;
    }

    private void listen() {
        getDocument().addDocumentListener(new DocumentListener() {
            @Override
            public void insertUpdate(DocumentEvent e) {
                search();
            }

            @Override
            public void removeUpdate(DocumentEvent e) {
                search();
            }

            @Override
            public void changedUpdate(DocumentEvent e) {
                search();
            }
        });
        addFocusListener(new FocusAdapter() {
            @Override
            public void focusGained(FocusEvent e) {
                selectAll();
            }

            @Override
            public void focusLost(FocusEvent e) {
                CrystalOffer marked = list.getSelectedValue();
                String typed = getText().strip();
                if (marked != null && !typed.equals(picked) && typed.equalsIgnoreCase(marked.name())) {
                    // A name typed to its end is meant, also without Enter.
                    pick();
                } else {
                    back();
                }
            }
        });
        addMouseListener(new MouseAdapter() {
            @Override
            public void mouseClicked(MouseEvent e) {
                if (isEnabled() && !popup.isVisible()) {
                    selectAll();
                    fill("");
                }
            }
        });
        list.addMouseListener(new MouseAdapter() {
            @Override
            public void mouseReleased(MouseEvent e) {
                int at = list.locationToIndex(e.getPoint());
                if (at >= 0 && list.getCellBounds(at, at).contains(e.getPoint())) {
                    list.setSelectedIndex(at);
                    pick();
                }
            }
        });
    }

    private void search() {
        if (!quiet) {
            fill(getText().strip());
        }
    }

    private void fill(String words) {
        if (!popup.isVisible()) {
            offers = source.get();
        }
        model.clear();
        offers.matching(words).forEach(model::addElement);
        if (!model.isEmpty()) {
            list.setSelectedIndex(0);
            list.ensureIndexIsVisible(0);
        }
        note.setText(text(words));
        note.setVisible(!note.getText().isEmpty());
        if (isShowing()) {
            int rows = Math.min(ROWS, model.size());
            pane.setPreferredSize(new Dimension(getWidth() - 2, rows * list.getFixedCellHeight() + 2));
            pane.setVisible(rows > 0);
            if (popup.isVisible()) {
                popup.pack();
            } else {
                popup.show(this, 0, getHeight());
            }
        }
    }

    private String text(String words) {
        if (model.isEmpty()) {
            return "Nothing on the shelf is called “" + words + "”.";
        }
        int troubles = offers.troubles().size();
        return troubles == 0 ? "" : Looks.wrapped(String.join(" ", offers.troubles()), 300);
    }

    private void move(int by) {
        if (!popup.isVisible()) {
            fill("");
            return;
        }
        int at = Math.max(0, Math.min(model.size() - 1, list.getSelectedIndex() + by));
        list.setSelectedIndex(at);
        list.ensureIndexIsVisible(at);
    }

    private void pick() {
        CrystalOffer offer = list.getSelectedValue();
        if (offer != null) {
            show(offer.name());
            selectAll();
            onPick.accept(offer);
        }
    }

    private void back() {
        popup.setVisible(false);
        quiet = true;
        if (!getText().equals(picked)) {
            setText(picked);
        }
        setCaretPosition(0);
        quiet = false;
    }

    /** A key that works in this field; some only while the list is open, so that the window gets them otherwise. */
    private void key(int code, String name, Runnable action, boolean onlyOpen) {
        getInputMap().put(KeyStroke.getKeyStroke(code, 0), name);
        getActionMap().put(name, new AbstractAction() {
            private static final long serialVersionUID = 1L;

            @Override
            public boolean isEnabled() {
                return !onlyOpen || popup.isVisible();
            }

            @Override
            public void actionPerformed(ActionEvent e) {
                action.run();
            }
        });
    }

    /** Name on the left, formula and place on the right. */
    private static final class OfferCell extends JPanel implements ListCellRenderer<CrystalOffer> {
        private static final long serialVersionUID = 1L;

        private final JLabel name = Looks.label(" ");
        private final JLabel detail = Looks.quiet(" ");

        OfferCell() {
            super(new BorderLayout(Looks.GAP, 0));
            setBorder(BorderFactory.createEmptyBorder(0, Looks.GAP, 0, Looks.GAP));
            add(name, BorderLayout.CENTER);
            add(detail, BorderLayout.EAST);
        }

        @Override
        public Component getListCellRendererComponent(
                JList<? extends CrystalOffer> in, CrystalOffer offer, int index, boolean selected, boolean focused) {
            name.setText(offer.name());
            detail.setText(offer.detail());
            setBackground(selected ? in.getSelectionBackground() : in.getBackground());
            return this;
        }
    }
}
