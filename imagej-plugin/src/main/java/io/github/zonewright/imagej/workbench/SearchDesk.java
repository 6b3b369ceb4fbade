package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.command.CommandRunner;
import io.github.zonewright.imagej.session.CandidateSearch;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.imagej.session.Ground;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.Measurement;
import io.github.zonewright.imagej.session.Search;
import io.github.zonewright.imagej.session.ZoneChoice;
import io.github.zonewright.indexing.RowAnswer;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.spots.MeasuredPattern;
import java.util.List;
import java.util.Optional;

/** Measures the spots of the current image and searches the orientation. */
final class SearchDesk {
    private final SolutionsSection section;
    private final InstrumentSection instrument;
    private final CrystalSection crystal;
    private final Bench bench;
    private final Runner runner;

    SearchDesk(
            SolutionsSection section,
            InstrumentSection instrument,
            CrystalSection crystal,
            Bench bench,
            Runner runner) {
        this.section = section;
        this.instrument = instrument;
        this.crystal = crystal;
        this.bench = bench;
        this.runner = runner;
        section.findOrientation().addActionListener(e -> findOrientation());
        section.wholeStack().addActionListener(e -> {
            CrystalChoice.remember(crystal.named());
            CommandRunner.start("command.FindInStack");
        });
        section.stop().addActionListener(e -> runner.stop("Stopped."));
        section.onChoose(solution -> {
            int place = bench.sitting().solutions().indexOf(solution) + 1;
            bench.change(s -> s.withChosen(solution));
            Recording.of("Move Pattern...", List.of(new Recording.Option("solution", Integer.toString(place))));
        });
    }

    /** Shows what is known of the current image. */
    void refresh(boolean ready) {
        section.judge(bench.sitting().verdict());
        section.show(
                bench.sitting().solutions(),
                bench.sitting().chosen(),
                bench.sitting().thickness(),
                bench.sitting().findings().row(),
                crystal.crystals().size() > 1);
        section.wholeStack()
                .setVisible(bench.image().filter(i -> i.getStackSize() > 1).isPresent());
        section.findOrientation().setEnabled(ready);
    }

    /** Measures the current image. */
    void findSpots(Measurement.How said) {
        findSpots(said, false);
    }

    private void findSpots(Measurement.How said, boolean thenOrientation) {
        bench.keepInstrument();
        bench.image()
                .ifPresent(i -> runner.start(
                        (progress, stopped) -> Search.judged(i, said), how -> measure(i, how, thenOrientation)));
    }

    private void measure(ImagePlus over, Measurement.How how, boolean thenOrientation) {
        runner.start((progress, stopped) -> Search.measure(over, how), measured -> {
            SpotsDesk.record(how);
            bench.change(s -> s.withMeasurement(s.measurement().withHow(how).withShown(true))
                    .withMeasured(measured));
            if (thenOrientation) {
                findOrientation();
            }
        });
    }

    private void findOrientation() {
        Optional<ImagePlus> over = bench.image();
        Optional<Instrument> said = instrument.instrument();
        if (over.isEmpty()
                || said.isEmpty()
                || crystal.crystal().isEmpty()
                || section.zones().isEmpty()) {
            return;
        }
        Optional<MeasuredPattern> measured = bench.sitting().measured();
        if (measured.isEmpty()) {
            findSpots(bench.sitting().measurement().how(), true);
            return;
        }
        try {
            Instrument known = said.get();
            CandidateSearch search = new CandidateSearch(
                    crystal.crystals(),
                    known.beam(),
                    known.knownCamera(over.get()),
                    section.zones().get());
            runner.start((progress, stopped) -> search.run(measured.get(), progress, stopped), result -> {
                found(over.get(), result);
                record(known);
            });
        } catch (IllegalArgumentException e) {
            bench.say(e.getMessage());
        }
    }

    private void record(Instrument known) {
        Recording.of(
                "Find Zone Axis...",
                List.of(
                        new Recording.Option("crystal", crystal.named()),
                        new Recording.Option("kilovolts", Reading.text(known.kilovolts())),
                        new Recording.Option("scalekind", known.kind().recorded()),
                        new Recording.Option("scale", Reading.text(known.scale())),
                        new Recording.Option("pixelsize", Reading.text(known.pixelMicrometres())),
                        new Recording.Option("binning", Integer.toString(known.binning())),
                        new Recording.Option("tolerance", Reading.text(known.tolerancePercent())),
                        new Recording.Option("mirrored", Boolean.toString(known.mirrored())),
                        new Recording.Option(
                                "zones", section.zones().map(ZoneChoice::text).orElse(ZoneChoice.ANY_LABEL)),
                        new Recording.Option(
                                "ground",
                                Ground.of(bench.sitting().measurement().how()).label()),
                        new Recording.Option(
                                "indices", Boolean.toString(bench.sitting().labelled())),
                        new Recording.Option("table", "false")));
    }

    private void found(ImagePlus over, SearchResult result) {
        bench.change(s -> s.withResult(result));
        // What a row tells stands where the verdict would.
        String row = result.row().map(RowAnswer::sentence).orElse("");
        section.spots(result.explanation().replace(row, "").strip() + ImagePixels.note(over));
    }
}
