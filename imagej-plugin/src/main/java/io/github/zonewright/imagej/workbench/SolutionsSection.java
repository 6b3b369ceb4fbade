package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.command.Answer;
import io.github.zonewright.imagej.session.ZoneChoice;
import io.github.zonewright.indexing.RowAnswer;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.Verdict;
import java.awt.Dimension;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import javax.swing.JButton;
import javax.swing.JLabel;
import javax.swing.JProgressBar;
import javax.swing.JScrollPane;
import javax.swing.SwingConstants;

/** The search, and its solutions to click through. */
final class SolutionsSection extends Section {
    private static final long serialVersionUID = 1L;
    private static final int WORDS_WIDTH = 500;

    private final JButton findOrientation = new JButton("Find orientation");
    private final CheckedField<ZoneChoice> zones = new CheckedField<>("zones searched", 7, Reading::zones);
    private final JButton wholeStack = new JButton("Whole stack…");
    private final JButton leftOver = new JButton("Left over…");
    private final JButton apart = new JButton("What tells apart…");
    private final JButton clicks = new JButton("By clicks…");
    private final JButton stop = new JButton("Stop");
    private final JProgressBar progress = new JProgressBar(0, 1000);
    private final JLabel spots = Looks.quiet(" ");
    private final JLabel note = Looks.quiet(" ");
    private final JLabel verdict = Looks.quiet(" ");
    private final SolutionsTable table = new SolutionsTable();
    private final JScrollPane pane = table.pane();
    private transient List<Solution> solutions = List.of();
    private transient Verdict judged = new Verdict.Open("");

    SolutionsSection() {
        super("Solutions");
        for (JButton button : List.of(findOrientation, wholeStack, stop, leftOver, apart, clicks)) {
            button.setFont(Looks.text());
            button.setName(button.getText());
        }
        findOrientation.setToolTipText("Searches the zone axis and rotation that explain the measured spots");
        wholeStack.setToolTipText("Searches all slices of this stack, with a table of the answers");
        wholeStack.setVisible(false);
        stop.setToolTipText("Ends the search; what was found before stays (Esc)");
        stop.setEnabled(false);
        progress.setPreferredSize(new Dimension(90, progress.getPreferredSize().height));
        progress.setMaximumSize(new Dimension(120, 16));
        zones.show(ZoneChoice.ANY_LABEL);
        zones.setToolTipText("Zone axes to search: any, one as 1 1 0, or a family as <1 1 0>");
        wide(line(findOrientation, Looks.label("Zone axes"), zones, stop, progress));
        saying(zones.reasonLabel());
        wide(spots);
        wide(pane);
        verdict.setName("verdict");
        verdict.setVerticalAlignment(SwingConstants.TOP);
        verdict.setToolTipText("How sure the answer is, for crystal, zone axis and rotation");
        wide(verdict);
        note.setName("remarks");
        note.setVerticalAlignment(SwingConstants.TOP);
        wide(note);
        leftOver.setToolTipText("A second grain, a twin or another phase among the spots that nothing explains");
        apart.setToolTipText("What tells the chosen solution from those that explain the same spots");
        clicks.setToolTipText("Index two or three spots that you click, with their h k l or without");
        wide(line(leftOver, apart, clicks, wholeStack));
    }

    /** The zone axes to search; empty when what is typed is wrong. */
    Optional<ZoneChoice> zones() {
        return zones.value();
    }

    JButton findOrientation() {
        return findOrientation;
    }

    JButton wholeStack() {
        return wholeStack;
    }

    JButton leftOver() {
        return leftOver;
    }

    JButton apart() {
        return apart;
    }

    JButton clicks() {
        return clicks;
    }

    JButton stop() {
        return stop;
    }

    void onChoose(Consumer<Solution> listener) {
        table.onChoose(listener);
    }

    /** Shows that a search runs, or none. */
    void searching(boolean running) {
        findOrientation.setEnabled(!running);
        stop.setEnabled(running);
        if (!running) {
            progress.setValue(0);
        }
    }

    void progress(double part) {
        progress.setValue((int) Math.round(1000 * part));
    }

    /** Says what there is to say of the search. */
    void spots(String text) {
        spots.setText(text.isBlank() ? " " : Looks.wrapped(text, WORDS_WIDTH));
        show(spots, !text.isBlank());
        spots.setToolTipText(text);
    }

    /**
     * Shows solutions and which of them is chosen, without telling the listener; with the names of their crystals where
     * there are several, or may be.
     */
    void show(
            List<Solution> found,
            Optional<Solution> chosen,
            double thickness,
            Optional<RowAnswer> row,
            boolean several) {
        solutions = found;
        boolean withCrystals = several
                || found.stream().map(s -> s.placement().crystal()).distinct().count() > 1;
        table.show(found, judged, chosen, thickness, withCrystals);
        show(pane, !found.isEmpty());
        verdict.setText(verdict(row));
        note.setText(chosen.map(SolutionsSection::remarks).orElse(" "));
        show(verdict, !verdict.getText().isBlank());
        show(note, !note.getText().isBlank());
        summary(chosen.map(s -> summary(s, found, judged)).orElse(""));
    }

    /** Is told how sure the solutions are that are shown next. */
    void judge(Verdict whole) {
        judged = whole;
    }

    private static String summary(Solution chosen, List<Solution> found, Verdict judged) {
        return Answer.name(chosen) + ", "
                + Reading.fixed(Math.toDegrees(chosen.placement().setting().rotation()), 2) + "°, "
                + (found.contains(chosen) ? Answer.verdict(chosen, found, judged) : "");
    }

    private String verdict(Optional<RowAnswer> row) {
        return solutions.isEmpty()
                ? row.map(r -> Looks.wrapped(r.sentence(), WORDS_WIDTH)).orElse(" ")
                : Looks.wrapped(judged.sentence(), WORDS_WIDTH);
    }

    private static String remarks(Solution solution) {
        String lean = Answer.lean(solution);
        List<String> all = new ArrayList<>(Answer.remarks(solution));
        all.add(0, "L" + lean.substring(1) + ".");
        return Looks.wrapped(String.join(" ", all), WORDS_WIDTH);
    }
}
