package io.github.zonewright.imagej.workbench;

import io.github.zonewright.crystal.Candidate;
import io.github.zonewright.crystal.CandidateFolder;
import io.github.zonewright.crystal.CandidateList;
import io.github.zonewright.imagej.session.CrystalOffer;
import io.github.zonewright.imagej.session.UserFolder;
import java.awt.BorderLayout;
import java.awt.Component;
import java.awt.Dimension;
import java.awt.GridLayout;
import java.io.IOException;
import java.nio.file.FileAlreadyExistsException;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import javax.swing.BorderFactory;
import javax.swing.DefaultListCellRenderer;
import javax.swing.DefaultListModel;
import javax.swing.JButton;
import javax.swing.JFrame;
import javax.swing.JLabel;
import javax.swing.JList;
import javax.swing.JPanel;
import javax.swing.JScrollPane;
import javax.swing.ListSelectionModel;

/** The user's lists of candidates: made, renamed, filled and deleted here, and taken into the workbench. */
final class CandidatesWindow extends JFrame {
    private static final long serialVersionUID = 1L;

    /** A change of the folder, which may fail. */
    @FunctionalInterface
    private interface Change {
        void run() throws IOException;
    }

    private final DefaultListModel<CandidateList> listModel = new DefaultListModel<>();
    private final DefaultListModel<Candidate> memberModel = new DefaultListModel<>();
    private final JList<CandidateList> lists = list("candidate lists", listModel);
    private final JList<Candidate> members = list("candidates", memberModel);
    private final CheckedField<String> name = new CheckedField<>("list name", 18, CandidatesWindow::named);
    private final JButton create = button("New list");
    private final JButton rename = button("Rename");
    private final JButton delete = button("Delete list");
    private final JButton add = button("Add the present crystal");
    private final JButton remove = button("Take off the list");
    private final JButton use = button("Use this list");
    private final JLabel said = Looks.quiet(" ");
    private final transient Consumer<CrystalOffer> onUse;
    private transient CrystalOffer present;
    private boolean sure;

    CandidatesWindow(Consumer<CrystalOffer> onUse) {
        super("Lists of candidates");
        this.onUse = onUse;
        setName("candidates window");
        setDefaultCloseOperation(DISPOSE_ON_CLOSE);
        said.setName("candidates note");
        create.addActionListener(e -> change(this::create));
        rename.addActionListener(e -> change(this::rename));
        delete.addActionListener(e -> change(this::delete));
        add.addActionListener(e -> change(this::addPresent));
        remove.addActionListener(e -> change(this::removeMember));
        use.addActionListener(e -> chosen().ifPresent(l -> onUse.accept(new CrystalOffer.Group(l))));
        lists.addListSelectionListener(e -> showMembers());
        members.addListSelectionListener(e -> arrange());
        name.onChange(this::arrange);
        lists.setCellRenderer(new NameCell());
        members.setCellRenderer(new NameCell());
        layOut();
        reload(Optional.empty());
        pack();
    }

    private void layOut() {
        JPanel left = column("Lists", lists, delete, use);
        JPanel right = column("Crystals on the list", members, add, remove);
        JPanel both = new JPanel(new GridLayout(1, 2, Looks.MARGIN, 0));
        both.add(left);
        both.add(right);
        JPanel naming = Section.line(Looks.label("Name"), name, create, rename, name.reasonLabel());
        naming.setBorder(BorderFactory.createEmptyBorder(0, 0, Looks.GAP, 0));
        JPanel body = new JPanel(new BorderLayout(0, Looks.GAP));
        body.setBorder(BorderFactory.createEmptyBorder(Looks.MARGIN, Looks.MARGIN, Looks.MARGIN, Looks.MARGIN));
        body.add(naming, BorderLayout.NORTH);
        body.add(both, BorderLayout.CENTER);
        body.add(said, BorderLayout.SOUTH);
        add(body);
    }

    private static JPanel column(String heading, JList<?> list, JButton... buttons) {
        JPanel column = new JPanel(new BorderLayout(0, Looks.GAP));
        JScrollPane pane = new JScrollPane(list);
        pane.setPreferredSize(new Dimension(280, 200));
        column.add(Looks.heading(heading), BorderLayout.NORTH);
        column.add(pane, BorderLayout.CENTER);
        column.add(Section.line(buttons), BorderLayout.SOUTH);
        return column;
    }

    private static JButton button(String label) {
        JButton button = new JButton(label);
        button.setName(label);
        button.setFont(Looks.text());
        return button;
    }

    private static <T> JList<T> list(String name, DefaultListModel<T> model) {
        JList<T> list = new JList<>(model);
        list.setName(name);
        list.setFont(Looks.text());
        list.setSelectionMode(ListSelectionModel.SINGLE_SELECTION);
        return list;
    }

    private static String named(String text) {
        if (text.isBlank()) {
            throw new IllegalArgumentException("a name, please");
        }
        return text;
    }

    /** Says which crystal is in the workbench now. */
    void present(CrystalOffer offer) {
        present = offer;
        arrange();
    }

    private Optional<CandidateList> chosen() {
        return Optional.ofNullable(lists.getSelectedValue());
    }

    private void create() throws IOException {
        String called = name.value().orElseThrow();
        UserFolder.lists().create(CandidateList.named(called));
        reload(Optional.of(called));
    }

    private void rename() throws IOException {
        String called = name.value().orElseThrow();
        UserFolder.lists().rename(chosen().orElseThrow().name(), called);
        reload(Optional.of(called));
    }

    private void delete() throws IOException {
        if (!sure) {
            sure = true;
            delete.setText("Click again");
            say("This deletes the list " + chosen().orElseThrow().name() + "; its crystals stay.", false);
            return;
        }
        UserFolder.lists().delete(chosen().orElseThrow().name());
        reload(Optional.empty());
    }

    private void addPresent() throws IOException {
        CandidateList longer = chosen().orElseThrow().with(present.candidate().orElseThrow());
        UserFolder.lists().save(longer);
        reload(Optional.of(longer.name()));
    }

    private void removeMember() throws IOException {
        CandidateList shorter = chosen().orElseThrow().without(members.getSelectedValue());
        UserFolder.lists().save(shorter);
        reload(Optional.of(shorter.name()));
    }

    private void change(Change change) {
        try {
            say(" ", false);
            change.run();
        } catch (FileAlreadyExistsException e) {
            say("There is a list of that name; expected another name.", true);
        } catch (IOException | IllegalArgumentException e) {
            say(Optional.ofNullable(e.getMessage()).orElse(e.toString()), true);
        }
    }

    private void say(String text, boolean wrong) {
        said.setForeground(wrong ? Looks.WRONG : Looks.QUIET);
        said.setText(text);
        said.setToolTipText(text);
    }

    private void reload(Optional<String> choose) {
        listModel.clear();
        try {
            CandidateFolder.Listing listing = UserFolder.lists().list();
            listing.lists().forEach(listModel::addElement);
            say("Kept in " + UserFolder.crystals().path().resolve("candidates"), false);
            if (!listing.unreadable().isEmpty()) {
                say("Can't be read: " + listing.unreadable(), true);
            }
        } catch (IOException | IllegalArgumentException e) {
            say(String.valueOf(e.getMessage()), true);
        }
        int at = -1;
        for (int i = 0; i < listModel.size(); i++) {
            if (choose.isEmpty() && i == 0
                    || choose.isPresent() && listModel.get(i).name().equals(choose.get())) {
                at = i;
            }
        }
        lists.setSelectedIndex(at);
        showMembers();
    }

    private void showMembers() {
        sure = false;
        delete.setText("Delete list");
        memberModel.clear();
        List<Candidate> candidates = chosen().map(CandidateList::candidates).orElse(List.of());
        candidates.forEach(memberModel::addElement);
        chosen().ifPresent(l -> name.show(l.name()));
        arrange();
    }

    private void arrange() {
        boolean one = chosen().isPresent();
        boolean kept = present != null && present.candidate().isPresent();
        create.setEnabled(name.value().isPresent());
        rename.setEnabled(one && name.value().isPresent());
        delete.setEnabled(one);
        use.setEnabled(one && !memberModel.isEmpty());
        remove.setEnabled(one && members.getSelectedIndex() >= 0);
        add.setEnabled(one && kept);
        add.setText(kept ? "Add " + present.name() : "Add the present crystal");
        add.setToolTipText(kept ? null : "Keep the crystal on your shelf first; a list holds what is kept");
    }

    /** The name alone. */
    private static final class NameCell extends DefaultListCellRenderer {
        private static final long serialVersionUID = 1L;

        @Override
        public Component getListCellRendererComponent(
                javax.swing.JList<?> in, Object value, int index, boolean selected, boolean focused) {
            String text = value instanceof CandidateList list ? list.name() : ((Candidate) value).name();
            super.getListCellRendererComponent(in, text, index, selected, focused);
            setFont(Looks.text());
            setBorder(BorderFactory.createEmptyBorder(2, Looks.GAP, 2, Looks.GAP));
            return this;
        }
    }
}
