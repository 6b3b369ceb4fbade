package io.github.zonewright.imagej.workbench;

import ij.Prefs;
import ij.io.OpenDialog;
import io.github.zonewright.crystal.Candidates;
import io.github.zonewright.crystal.CifStructure;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.command.CrystalReport;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.imagej.session.CrystalOffer;
import io.github.zonewright.imagej.session.CrystalOffers;
import java.awt.Window;
import java.io.File;
import java.io.IOException;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import javax.swing.JButton;
import javax.swing.JFrame;

/** The crystal, or a list of candidates: picked by name or formula, opened from a CIF file, or typed in. */
final class CrystalSection extends Section {
    private static final long serialVersionUID = 1L;
    private static final String KEY = "zonewright.crystal";
    private static final String FIRST = "Aluminium";
    private static final int TEXT_HEIGHT = 62;

    private final CrystalPicker picker = new CrystalPicker();
    private final JButton open = button("Open CIF…", "Reads a crystal from a CIF file; it may also be dropped here");
    private final JButton type = button("Type in…", "A crystal by its structure type, or by cell, group and sites");
    private final JButton lists =
            button("Candidates…", "Lists of crystals to search together, as the phases of a steel");
    private final JButton zones =
            button("Zones", "Draws the lowest zones of this crystal at the present scale, to hold beside the image");
    private final CrystalText text = new CrystalText("crystal text", TEXT_HEIGHT);
    private final KeepCrystalRow keep = new KeepCrystalRow();
    private final transient List<CrystalOffer.Loose> loose = new ArrayList<>();
    private final transient Map<CrystalOffer, String> files = new HashMap<>();
    private transient CrystalOffer offer;
    private transient List<Crystal> crystals = List.of();
    private transient Optional<Crystal> current = Optional.empty();
    private transient List<String> missing = List.of();
    private transient Runnable onChange = () -> {};
    private transient Optional<JFrame> typing = Optional.empty();
    private transient Optional<CandidatesWindow> candidates = Optional.empty();

    CrystalSection() {
        super("Crystal");
        row("Name or formula", picker);
        row("", open, type, lists, zones);
        wide(text);
        wide(keep);
        picker.source(() -> CrystalOffers.now(loose));
        picker.onPick(this::use);
        open.addActionListener(e -> ask());
        type.addActionListener(e -> type());
        lists.addActionListener(e -> lists());
        keep.onKept(this::kept);
        keep.onRemoved(this::removed);
        CrystalOffers now = CrystalOffers.now(loose);
        take(now.named(Prefs.get(KEY, FIRST)).or(() -> now.named(FIRST)).orElseThrow());
    }

    /** Draws the zone chart. */
    JButton zones() {
        return zones;
    }

    private static JButton button(String label, String tip) {
        JButton button = new JButton(label);
        button.setName(label);
        button.setFont(Looks.text());
        button.setToolTipText(tip);
        return button;
    }

    void onChange(Runnable listener) {
        onChange = listener;
    }

    /** The crystal to lay and describe: of a list, the one that was shown last, or its first. */
    Optional<Crystal> crystal() {
        return current;
    }

    /** What to search: one crystal, or those of the list. */
    List<Crystal> crystals() {
        return crystals;
    }

    /** How a macro names what to search: by its name, or by its file where it stands in no other place. */
    String named() {
        return offer == null ? "" : files.getOrDefault(offer, offer.name());
    }

    /** Shows a crystal that came from elsewhere, without telling the listener. A list that has it stays. */
    void show(Crystal other) {
        if (current.filter(other::equals).isPresent()) {
            return;
        }
        if (crystals.contains(other)) {
            current = Optional.of(other);
            describe();
        } else {
            take(known(other));
        }
    }

    private CrystalOffer known(Crystal other) {
        Optional<CrystalOffer> same = CrystalOffers.now(loose).offers().stream()
                .filter(o -> !(o instanceof CrystalOffer.Group) && o.name().equals(other.name()))
                .filter(o -> read(o).filter(r -> r.crystals().contains(other)).isPresent())
                .findFirst();
        return same.orElseGet(() -> remember(new CrystalOffer.Loose(other, "of an image")));
    }

    private CrystalOffer.Loose remember(CrystalOffer.Loose other) {
        loose.removeIf(o -> o.name().equals(other.name()));
        loose.add(0, other);
        return other;
    }

    private static Optional<Candidates> read(CrystalOffer offer) {
        try {
            return Optional.of(offer.read());
        } catch (IOException | IllegalArgumentException e) {
            return Optional.empty();
        }
    }

    /** Opens a CIF file; what is wrong with it is said where the cell would be. */
    void read(File file) {
        try {
            List<CifStructure> structures = CrystalChoice.structures(file);
            if (structures.size() > 1) {
                StructureWindow window = new StructureWindow(
                        file.getName(),
                        structures,
                        u -> opened(u.crystal(), file, file.getPath() + "#" + (structures.indexOf(u) + 1)));
                beside(window);
            } else if (structures.get(0) instanceof CifStructure.Refused refused) {
                text.refuse(file.getName() + ": " + refused.reason());
            } else if (structures.get(0) instanceof CifStructure.Usable usable) {
                opened(usable.crystal(), file, file.getPath());
            }
        } catch (IOException | IllegalArgumentException e) {
            text.refuse(
                    file.getName() + ": " + Optional.ofNullable(e.getMessage()).orElse(e.toString()));
        }
    }

    private void opened(Crystal crystal, File file, String macroName) {
        CrystalOffer.Loose one = remember(new CrystalOffer.Loose(crystal, file.getName()));
        files.put(one, macroName);
        use(one);
    }

    /** Closes the windows that were opened from here. */
    void closeWindows() {
        typing.ifPresent(JFrame::dispose);
        candidates.ifPresent(JFrame::dispose);
        for (Window window : Window.getWindows()) {
            if (window instanceof StructureWindow && window.isDisplayable()) {
                window.dispose();
            }
        }
    }

    private void ask() {
        OpenDialog dialog = new OpenDialog("Open a crystal from a CIF file");
        if (dialog.getPath() != null) {
            read(new File(dialog.getPath()));
        }
    }

    private void type() {
        if (typing.filter(JFrame::isDisplayable).isEmpty()) {
            typing = Optional.of(new TypeInWindow(this::useTyped));
            beside(typing.get());
        }
        typing.get().toFront();
    }

    private void useTyped(CrystalOffer typed) {
        use(typed instanceof CrystalOffer.Loose one ? remember(one) : typed);
    }

    private void lists() {
        if (candidates.filter(JFrame::isDisplayable).isEmpty()) {
            candidates = Optional.of(new CandidatesWindow(this::use));
            candidates.get().present(offer);
            beside(candidates.get());
        }
        candidates.get().toFront();
    }

    private void beside(JFrame window) {
        Looks.beside(this, window);
    }

    /** Takes an offer and tells the listener. */
    private void use(CrystalOffer other) {
        if (take(other)) {
            if (!(other instanceof CrystalOffer.Loose)) {
                Prefs.set(KEY, other.name());
            }
            onChange.run();
        }
    }

    private boolean take(CrystalOffer other) {
        try {
            Candidates read = other.read();
            if (read.crystals().isEmpty()) {
                text.show(List.of("The list " + other.name() + " holds no crystal that can be read."), read.missing());
                picker.show(offer == null ? "" : offer.name());
                return false;
            }
            offer = other;
            crystals = read.crystals();
            missing = read.missing();
            current = Optional.of(crystals.get(0));
            picker.show(other.name());
            summary(other.name());
            keep.show(other);
            candidates.ifPresent(w -> w.present(other));
            describe();
            return true;
        } catch (IOException | IllegalArgumentException e) {
            text.refuse(other.name() + ": " + e.getMessage());
            return false;
        }
    }

    private void describe() {
        List<String> first = new ArrayList<>();
        if (offer instanceof CrystalOffer.Group) {
            first.add("To be searched: "
                    + String.join(", ", crystals.stream().map(Crystal::name).toList()));
            first.addAll(missing);
            first.add(current.map(Crystal::name).orElse(""));
            crystals.stream()
                    .filter(c -> !current.filter(c::equals).isPresent())
                    .forEach(c -> CrystalReport.of(c).cautions().forEach(t -> first.add(c.name() + ": " + t)));
        }
        text.show(first, CrystalReport.of(current.orElseThrow()), where());
        revalidate();
    }

    private List<String> where() {
        if (offer instanceof CrystalOffer.InFolder mine) {
            return List.of("Kept in " + mine.kept().file());
        }
        return List.of();
    }

    private void kept(CrystalOffer.InFolder mine) {
        if (files.containsKey(offer)) {
            Recording.of(
                    "Keep Crystal...",
                    List.of(new Recording.Option("crystal", named()), new Recording.Option("keepas", mine.name())));
        }
        loose.removeIf(o -> o.equals(offer));
        use(mine);
    }

    private void removed(CrystalOffer.InFolder mine) {
        use(remember(new CrystalOffer.Loose(mine.kept().crystal(), "removed from my shelf")));
    }
}
