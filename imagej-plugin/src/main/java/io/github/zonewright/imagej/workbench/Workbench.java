package io.github.zonewright.imagej.workbench;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.imagej.bridge.ReciprocalCalibration;
import io.github.zonewright.imagej.command.DrawZoneChart;
import io.github.zonewright.imagej.command.RecordSession;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.ScaleKind;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.pattern.Placement;
import java.awt.event.KeyEvent;
import java.io.File;
import java.io.IOException;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import java.util.function.UnaryOperator;
import javax.swing.SwingUtilities;

/**
 * The window beside the image: from instrument and crystal to the kept record. It follows the current image; what is known
 * of a pattern stays with its image, so the window may be closed and opened again. All methods belong on the event thread.
 */
public final class Workbench {
    private static Workbench open;

    private final InstrumentSection instrument = new InstrumentSection();
    private final CrystalSection crystal = new CrystalSection();
    private final SpotsSection spots = new SpotsSection();
    private final SolutionsSection solutions = new SolutionsSection();
    private final HandSection hand = new HandSection();
    private final KeepSection keep = new KeepSection();
    private final Bench bench = new Shared();
    private final SeeingSection seeing = new SeeingSection(bench::image, bench::say);
    private final WorkbenchFrame frame = new WorkbenchFrame(instrument, crystal, spots, solutions, hand, seeing, keep);
    private final Runner runner = new Runner(solutions, bench);
    private final SearchDesk search = new SearchDesk(solutions, instrument, crystal, bench, runner);
    private final HandDesk byHand = new HandDesk(hand, instrument, crystal, bench, runner);
    private final SpotsDesk desk = new SpotsDesk(spots, bench::image, bench::change, search::findSpots, bench::say);
    private final QuestionsDesk questions = new QuestionsDesk(solutions, instrument, crystal, spots, bench, runner);
    private final ImageFollower follower = new ImageFollower(this::imageChanged, this::sittingShown, Workbench::zoomed);
    private final Consumer<ImagePlus> sittings = image -> SwingUtilities.invokeLater(() -> sittingShown(image));
    private final CalibrationWindows calibrations = new CalibrationWindows(instrument, bench::image);
    private Optional<Instrument> shown = Optional.empty();

    private Workbench() {
        instrument.onChange(this::instrumentChanged);
        crystal.onChange(this::crystalChanged);
        crystal.zones().addActionListener(e -> drawZones());
        keep.onRefused(bench::say);
        frame.onUndo(byHand::undo);
        frame.onStop(() -> {
            runner.stop("Stopped.");
            IJ.setKeyDown(KeyEvent.VK_ESCAPE);
        });
        frame.onDrop(this::dropped);
        frame.onClose(this::closed);
        Sitting.addListener(sittings);
        follower.start();
        refresh();
    }

    /**
     * Opens the window, or brings it to the front.
     *
     * @return the workbench
     */
    public static Workbench open() {
        if (open == null) {
            open = new Workbench();
            open.frame.place(Optional.ofNullable(WindowManager.getCurrentImage()));
        }
        open.frame.toFront();
        return open;
    }

    /**
     * The window.
     *
     * @return the frame
     */
    public javax.swing.JFrame frame() {
        return frame;
    }

    private void imageChanged(Optional<ImagePlus> now) {
        runner.stop("");
        solutions.spots("");
        now.ifPresent(image -> {
            Instrument.crystalOf(image).ifPresent(crystal::show);
            Optional<Instrument> kept = Instrument.of(image);
            shown = kept;
            if (kept.isPresent()) {
                instrument.show(kept.get());
            } else if (ReciprocalCalibration.of(image).cameraConstant().isPresent()) {
                instrument.show(
                        instrument.instrument().orElse(Instrument.last()).withKind(ScaleKind.IMAGE));
            } else {
                Instrument last = Instrument.last();
                instrument.show(last.kind() == ScaleKind.IMAGE ? last.withKind(ScaleKind.PIXELS) : last);
            }
            if (instrument.instrument().flatMap(Instrument::calibration).isPresent()) {
                keepWithImage();
            }
        });
        refresh();
    }

    /** Draws the marks in the size that suits the zoom. */
    private static void zoomed(ImagePlus image) {
        Sitting now = Sitting.of(image);
        if (now != Sitting.EMPTY) {
            now.show(image);
        }
    }

    private void sittingShown(ImagePlus image) {
        if (open == this && bench.image().filter(i -> i == image).isPresent()) {
            Instrument.keptWith(image)
                    .filter(kept -> shown.filter(s -> s == kept).isEmpty())
                    .ifPresent(kept -> {
                        shown = Optional.of(kept);
                        instrument.show(kept);
                    });
            refresh();
        }
    }

    private void instrumentChanged() {
        instrument.instrument().ifPresent(said -> {
            said.remember();
            keepWithImage();
        });
        refresh();
    }

    private void keepWithImage() {
        if (bench.image().isPresent()
                && instrument.instrument().isPresent()
                && crystal.crystal().isPresent()) {
            shown = instrument.instrument();
            shown.get().keepWith(bench.image().get(), crystal.crystal().get());
        }
    }

    private void crystalChanged() {
        keepWithImage();
        solutions.spots("");
        crystal.crystal().ifPresent(byHand::relay);
        refresh();
    }

    private void drawZones() {
        Optional<Instrument> said = instrument.instrument();
        if (bench.image().isEmpty() || said.isEmpty() || crystal.crystal().isEmpty()) {
            return;
        }
        try {
            drawZones(bench.image().get(), said.get(), crystal.crystal().get());
        } catch (IllegalArgumentException e) {
            bench.say(e.getMessage());
        }
    }

    /** At the scale of the pattern that lies on the image, or else of the instrument. */
    private void drawZones(ImagePlus beside, Instrument said, Crystal of) {
        double constant = bench.sitting()
                .placement()
                .map(p -> p.camera().constant())
                .orElseGet(() -> said.cameraConstant(beside));
        DrawZoneChart.show(of, said.beam(), constant);
        Recording.of(
                "Zone Chart...",
                List.of(
                        new Recording.Option("crystal", crystal.named()),
                        new Recording.Option("kilovolts", Reading.text(said.kilovolts())),
                        new Recording.Option("scalekind", ScaleKind.PIXELS.recorded()),
                        new Recording.Option("scale", Reading.text(constant)),
                        new Recording.Option("paper", "0")));
    }

    /** A record is opened on the current image; any other file is read for its crystal. */
    private void dropped(File file) {
        if (!RecordSession.isRecord(file)) {
            crystal.read(file);
            return;
        }
        if (bench.image().isEmpty()) {
            bench.say("Open the image of the record first, then drop the record again.");
            return;
        }
        ImagePlus over = bench.image().get();
        try {
            CifFile record = RecordSession.read(file);
            Placement laid = FitDocument.read(record).placement();
            runner.start((progress, stopped) -> RecordSession.of(record, over), session -> {
                Instrument said = Instrument.of(laid);
                said.keepWith(over, laid.crystal());
                instrument.show(said);
                crystal.show(laid.crystal());
                session.mark(over);
                bench.change(before -> session.sitting());
                bench.say(session.sentence());
                Recording.of(
                        "Open Record...",
                        List.of(
                                new Recording.Option("record", file.getPath()),
                                new Recording.Option("table", "false")));
            });
        } catch (IOException | IllegalArgumentException e) {
            bench.say(e.getMessage());
        }
    }

    private void closed() {
        runner.stop("");
        crystal.closeWindows();
        calibrations.close();
        questions.close();
        seeing.end();
        follower.end();
        Sitting.removeListener(sittings);
        open = null;
    }

    private void refresh() {
        Optional<ImagePlus> over = bench.image();
        Sitting now = bench.sitting();
        Optional<String> wrong = instrument.derive(over.orElse(null), now.placement());
        calibrations.refresh();
        boolean free = over.isPresent() && runner.isFree();
        crystal.zones().setEnabled(over.isPresent() && wrong.isEmpty());
        search.refresh(free && wrong.isEmpty());
        desk.refresh(over, now, free, crystal.crystals());
        byHand.refresh();
        questions.refresh();
        seeing.refresh();
        now.placement().map(Placement::crystal).ifPresent(crystal::show);
        keep.show(over, now.chosen());
        Guide guide = Guide.of(over.isPresent(), !runner.isFree(), wrong, now);
        frame.guide(over.map(ImagePlus::getTitle), guide);
    }

    /** What the parts share. */
    private final class Shared implements Bench {
        @Override
        public Optional<ImagePlus> image() {
            return follower.current();
        }

        @Override
        public void change(UnaryOperator<Sitting> how) {
            image().ifPresent(i -> {
                History.of(i).keep(i);
                how.apply(Sitting.of(i)).show(i);
            });
        }

        @Override
        public void keepInstrument() {
            keepWithImage();
        }

        @Override
        public void say(String sentence) {
            solutions.spots(sentence);
            IJ.showStatus(sentence);
        }

        @Override
        public void refresh() {
            Workbench.this.refresh();
        }
    }
}
