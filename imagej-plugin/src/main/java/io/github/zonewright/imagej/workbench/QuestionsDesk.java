package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.bridge.LeftoverTable;
import io.github.zonewright.imagej.command.Answer;
import io.github.zonewright.imagej.session.ClickedSpots;
import io.github.zonewright.imagej.session.Comparison;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.imagej.session.Figures;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.Measurement;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.HandAnswer;
import io.github.zonewright.indexing.Leftovers;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.spots.MeasuredPattern;
import java.awt.Component;
import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.Collectors;

/** Answers what is asked about the solution shown: what is left over, what tells it from another; and by clicked spots. */
final class QuestionsDesk {
    private final QuestionsWindow window = new QuestionsWindow();
    private final InstrumentSection instrument;
    private final CrystalSection crystal;
    private final SpotsSection spots;
    private final Bench bench;
    private final Runner runner;

    /** The solution whose leftovers were searched last. */
    private Optional<Solution> searched = Optional.empty();

    QuestionsDesk(
            SolutionsSection section,
            InstrumentSection instrument,
            CrystalSection crystal,
            SpotsSection spots,
            Bench bench,
            Runner runner) {
        this.instrument = instrument;
        this.crystal = crystal;
        this.spots = spots;
        this.bench = bench;
        this.runner = runner;
        section.leftOver().addActionListener(e -> open(window.leftover(), section));
        section.apart().addActionListener(e -> open(window.apart(), section));
        section.clicks().addActionListener(e -> open(window.clicks(), section));
        window.leftover().search().addActionListener(e -> search());
        window.leftover().table().addActionListener(e -> table());
        window.onTurn(this::refresh);
        window.apart().onChoose(this::refresh);
        window.clicks().click().addActionListener(e -> spots.choose(HandMode.RULER));
        window.clicks().again().addActionListener(e -> again());
        window.clicks().index().addActionListener(e -> index());
        window.clicks().onChoose(this::lay);
    }

    private void open(Component part, Component owner) {
        window.leftover().offer(CrystalChoice.names(true));
        window.open(part, owner);
        refresh();
    }

    /** Shows what is known of the current image, if the window is open. */
    void refresh() {
        if (!window.isVisible()) {
            return;
        }
        Sitting now = bench.sitting();
        boolean free = bench.image().isPresent() && runner.isFree();
        Optional<Solution> shown = now.chosen().filter(s -> now.measured().isPresent());
        window.leftover()
                .show(free && shown.filter(s -> !s.unexplained().isEmpty()).isPresent(), leftover(now, shown));
        window.apart()
                .show(
                        shown.map(s -> Answer.name(s) + " against").orElse("Find the orientation of this image first."),
                        shown.map(s -> Comparison.of(now, s)).orElse(List.of()),
                        free);
        window.clicks().show(now.measurement().ruler().size(), free);
        window.apart().unanswered().filter(pair -> free).ifPresent(this::compare);
    }

    private List<String> leftover(Sitting now, Optional<Solution> shown) {
        if (shown.isEmpty()) {
            return List.of("Find the orientation of this image first.");
        }
        if (searched.equals(shown) || !now.findings().grains().isEmpty()) {
            return Answer.leftovers(now);
        }
        int left = shown.get().unexplained().size();
        return List.of((left == 0 ? "No" : left) + (left == 1 ? " spot is" : " spots are") + " left over.");
    }

    void close() {
        window.dispose();
    }

    private void search() {
        Sitting now = bench.sitting();
        if (now.chosen().isEmpty() || now.measured().isEmpty()) {
            return;
        }
        Solution shown = now.chosen().get();
        MeasuredPattern measured = now.measured().get();
        String name = window.leftover().named().orElseGet(crystal::named);
        List<Crystal> crystals;
        try {
            crystals = window.leftover().named().isPresent() ? CrystalChoice.group(name, null) : crystal.crystals();
        } catch (IOException | IllegalArgumentException e) {
            bench.say(e.getMessage());
            return;
        }
        runner.start((progress, stopped) -> Leftovers.of(crystals).search(measured, shown, stopped), found -> {
            searched = Optional.of(shown);
            bench.change(s -> s.withFindings(s.findings().withGrains(found.grains())));
            bench.say(found.explanation());
            Recording.of(
                    "What Is Left Over...",
                    List.of(new Recording.Option("crystals", name), new Recording.Option("table", "false")));
        });
    }

    private void table() {
        Recording.flag("What Is Left Over...", "table");
        Sitting now = bench.sitting();
        bench.image()
                .ifPresent(i -> now.chosen()
                        .ifPresent(s ->
                                LeftoverTable.of(s, now.findings().grains()).show("Left over of " + i.getTitle())));
    }

    private void compare(Comparison pair) {
        Optional<MeasuredPattern> measured = bench.sitting().measured();
        if (measured.isEmpty()) {
            return;
        }
        window.apart().answered(pair);
        runner.start((progress, stopped) -> pair.discrimination(measured.get()), found -> {
            window.apart().show(found, pair.first().placement().camera().mirrored());
            Sitting now = bench.sitting();
            bench.image()
                    .filter(i -> now.chosen().filter(pair.first()::equals).isPresent())
                    .ifPresent(i -> now.withFindings(now.findings().withApart(pair.told(found)))
                            .show(i));
            List<Solution> all = now.solutions();
            String other = pair.label().replaceAll(":.*", "");
            Recording.of(
                    "What Tells Apart...",
                    List.of(
                            new Recording.Option("solution", Integer.toString(all.indexOf(pair.first()) + 1)),
                            new Recording.Option("other", other)));
        });
    }

    private void again() {
        bench.change(s -> s.withMeasurement(s.measurement().withoutRuler()));
        spots.choose(HandMode.RULER);
    }

    private void index() {
        Optional<Instrument> known = instrument.instrument();
        if (bench.image().isEmpty() || known.isEmpty()) {
            return;
        }
        ImagePlus over = bench.image().get();
        try {
            List<HandAnswer> found = ClickedSpots.index(
                    over,
                    bench.sitting(),
                    known.get(),
                    crystal.crystals(),
                    ClickedSpots.of(
                            ClickedSpots.ofRuler(bench.sitting()),
                            window.clicks().hkl()));
            window.clicks().show(found);
            bench.say(
                    found.isEmpty()
                            ? "No zone of these crystals has such spots."
                            : found.size() + (found.size() == 1 ? " zone fits." : " zones fit."));
        } catch (IllegalArgumentException e) {
            bench.say(e.getMessage());
        }
    }

    private void lay(HandAnswer answer) {
        bench.change(s -> s.withPlacement(answer.placement()));
        Measurement measurement = bench.sitting().measurement();
        List<Recording.Option> options = new ArrayList<>();
        options.add(new Recording.Option(
                "spots",
                measurement.ruler().stream()
                        .map(p -> Figures.place(p.place().x()) + " "
                                + Figures.place(p.place().y()))
                        .collect(Collectors.joining("; "))));
        options.add(new Recording.Option("hkl", window.clicks().hkl()));
        options.add(new Recording.Option("crystal", crystal.named()));
        options.add(new Recording.Option(
                "constant", Reading.text(answer.placement().camera().constant())));
        options.add(new Recording.Option("table", "false"));
        Recording.of("Index by Hand...", options);
    }
}
