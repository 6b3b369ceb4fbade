package io.github.zonewright.imagej.workbench;

import ij.IJ;
import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.bridge.ReciprocalCalibration;
import io.github.zonewright.imagej.command.AppliedCalibration;
import io.github.zonewright.imagej.command.CandidateSearch;
import io.github.zonewright.imagej.command.CommandRunner;
import io.github.zonewright.imagej.command.Instrument;
import io.github.zonewright.imagej.command.Measurement;
import io.github.zonewright.imagej.command.RecordSession;
import io.github.zonewright.imagej.command.ReferenceReflection;
import io.github.zonewright.imagej.command.ScaleKind;
import io.github.zonewright.imagej.command.Search;
import io.github.zonewright.imagej.command.Sitting;
import io.github.zonewright.indexing.KnownCamera;
import io.github.zonewright.indexing.Refinement;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.PatternCentre;
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
    private final SeeingSection seeing = new SeeingSection(this::image, this::say);
    private final KeepSection keep = new KeepSection();
    private final WorkbenchFrame frame = new WorkbenchFrame(instrument, crystal, spots, solutions, hand, seeing, keep);
    private final SpotsDesk desk =
            new SpotsDesk(spots, this::image, this::change, how -> findSpots(how, false), this::say);
    private final ImageFollower follower = new ImageFollower(this::imageChanged, this::sittingShown, Workbench::zoomed);
    private final Consumer<ImagePlus> sittings = image -> SwingUtilities.invokeLater(() -> sittingShown(image));
    private final CalibrationWindows calibrations = new CalibrationWindows(instrument, this::image);
    private Optional<Instrument> shown = Optional.empty();
    private Optional<Background<?>> running = Optional.empty();

    private Workbench() {
        instrument.onChange(this::instrumentChanged);
        crystal.onChange(this::crystalChanged);
        solutions.findOrientation().addActionListener(e -> findOrientation());
        solutions.wholeStack().addActionListener(e -> CommandRunner.start("command.FindInStack"));
        solutions.stop().addActionListener(e -> stop("Stopped."));
        solutions.onChoose(solution -> change(s -> s.withChosen(solution)));
        hand.onChange(this::changeByHand);
        hand.onNew(this::lay);
        hand.refine().addActionListener(e -> refine());
        hand.undo().addActionListener(e -> undo());
        hand.back().addActionListener(e -> image().ifPresent(HandKeys::goBack));
        hand.indices()
                .addActionListener(e -> image().ifPresent(i ->
                        Sitting.of(i).withLabels(hand.indices().isSelected()).show(i)));
        keep.onRefused(this::say);
        frame.onUndo(this::undo);
        frame.onStop(() -> {
            stop("Stopped.");
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

    private Optional<ImagePlus> image() {
        return follower.current();
    }

    private Sitting sitting() {
        return image().map(Sitting::of).orElse(Sitting.EMPTY);
    }

    private void imageChanged(Optional<ImagePlus> now) {
        stop("");
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
        if (open == this && image().filter(i -> i == image).isPresent()) {
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
        if (image().isPresent()
                && instrument.instrument().isPresent()
                && crystal.crystal().isPresent()) {
            shown = instrument.instrument();
            shown.get().keepWith(image().get(), crystal.crystal().get());
        }
    }

    private void crystalChanged() {
        keepWithImage();
        solutions.spots("");
        image().ifPresent(i -> {
            Sitting before = Sitting.of(i);
            crystal.crystal()
                    .ifPresent(c -> before.placement()
                            .filter(p -> !p.crystal().equals(c))
                            .ifPresent(p -> relay(c, p)));
        });
        refresh();
    }

    /** The same zone of another crystal in place of the pattern that lies there. */
    private void relay(Crystal other, Placement p) {
        try {
            ZoneSetting s = p.setting();
            ZoneSetting setting = new ZoneSetting(
                    s.zone(), ReferenceReflection.of(other, s.zone()), s.rotation(), s.leanX(), s.leanY());
            change(before ->
                    before.withSolutions(List.of()).withPlacement(new Placement(other, p.beam(), setting, p.camera())));
        } catch (IllegalArgumentException e) {
            say(e.getMessage());
        }
    }

    private void change(UnaryOperator<Sitting> how) {
        image().ifPresent(i -> {
            History.of(i).keep(i);
            how.apply(Sitting.of(i)).show(i);
        });
    }

    private void changeByHand(Placement placement) {
        image().ifPresent(i -> {
            History.of(i).keepBefore(i, placement);
            Sitting.of(i).withPlacement(placement).show(i);
        });
    }

    private void lay(Uvw zone) {
        Optional<Instrument> said = instrument.instrument();
        if (image().isEmpty() || said.isEmpty() || crystal.crystal().isEmpty()) {
            return;
        }
        ImagePlus over = image().get();
        Crystal c = crystal.crystal().get();
        try {
            PixelPoint centre = sitting()
                    .measured()
                    .flatMap(MeasuredPattern::centre)
                    .map(PatternCentre::position)
                    .or(() -> said.get().applied().flatMap(AppliedCalibration::centre))
                    .orElse(new PixelPoint(over.getWidth() / 2.0, over.getHeight() / 2.0));
            ZoneSetting setting = ZoneSetting.onZone(zone, ReferenceReflection.of(c, zone), 0);
            Camera camera = said.get().camera(centre, over);
            Placement placement = new Placement(c, said.get().beam(), setting, camera);
            change(s -> s.withPlacement(placement));
        } catch (IllegalArgumentException e) {
            say(e.getMessage());
        }
    }

    private void undo() {
        image().ifPresent(i -> History.of(i).back().ifPresent(before -> before.show(i)));
        refresh();
    }

    private void findSpots(Measurement.How said, boolean thenOrientation) {
        keepWithImage();
        image().ifPresent(i ->
                start((progress, stopped) -> Search.judged(i, said), how -> measure(i, how, thenOrientation)));
    }

    private void measure(ImagePlus over, Measurement.How how, boolean thenOrientation) {
        start((progress, stopped) -> Search.measure(over, how), measured -> {
            SpotsDesk.record(how);
            change(s -> s.withMeasurement(s.measurement().withHow(how).withShown(true))
                    .withMeasured(measured));
            if (thenOrientation) {
                findOrientation();
            }
        });
    }

    private void findOrientation() {
        Optional<ImagePlus> over = image();
        Optional<Instrument> said = instrument.instrument();
        if (over.isEmpty() || said.isEmpty() || crystal.crystal().isEmpty()) {
            return;
        }
        Optional<MeasuredPattern> measured = Sitting.of(over.get()).measured();
        if (measured.isEmpty()) {
            findSpots(sitting().measurement().how(), true);
            return;
        }
        try {
            Instrument known = said.get();
            CandidateSearch search =
                    new CandidateSearch(crystal.crystals(), known.beam(), known.knownCamera(over.get()));
            start(
                    (progress, stopped) -> search.run(measured.get(), progress, stopped),
                    result -> found(over.get(), result));
        } catch (IllegalArgumentException e) {
            say(e.getMessage());
        }
    }

    private void found(ImagePlus over, SearchResult result) {
        change(s -> s.withSolutions(result.solutions()));
        solutions.spots(result.explanation() + ImagePixels.note(over));
    }

    private void refine() {
        Sitting now = sitting();
        if (now.measured().isEmpty() || now.placement().isEmpty()) {
            return;
        }
        MeasuredPattern measured = now.measured().get();
        Placement from = now.placement().get();
        Optional<KnownCamera> known = instrument
                .instrument()
                .filter(i -> i.calibration().isPresent()
                        && i.mirrored() == from.camera().mirrored())
                .map(i -> i.knownCamera(null));
        start(
                (progress, stopped) -> known.isPresent()
                        ? Refinement.refine(measured, from, known.get())
                        : Refinement.refine(measured, from),
                this::refined);
    }

    /** A record is opened on the current image; any other file is read for its crystal. */
    private void dropped(File file) {
        if (!RecordSession.isRecord(file)) {
            crystal.read(file);
            return;
        }
        if (image().isEmpty()) {
            say("Open the image of the record first, then drop the record again.");
            return;
        }
        ImagePlus over = image().get();
        try {
            CifFile record = RecordSession.read(file);
            Placement laid = FitDocument.read(record).placement();
            start((progress, stopped) -> RecordSession.of(record, over), session -> {
                Instrument said = Instrument.of(laid);
                said.keepWith(over, laid.crystal());
                instrument.show(said);
                crystal.show(laid.crystal());
                change(before -> session.sitting());
                say(session.sentence());
            });
        } catch (IOException | IllegalArgumentException e) {
            say(e.getMessage());
        }
    }

    private void refined(Optional<Solution> solution) {
        solution.ifPresentOrElse(
                fitted -> change(s -> s.withRefined(fitted)),
                () -> say("Fewer than three spots lie near the pattern: turn or shift it first."));
    }

    /** Runs work for the current image; what comes of it is dropped when another image has become current. */
    private <T> void start(Background.Work<T> work, Consumer<T> onDone) {
        stop("");
        solutions.spots("");
        Background<T> background = new Background<>(
                work,
                solutions::progress,
                result -> {
                    ended();
                    onDone.accept(result);
                    refresh();
                },
                message -> {
                    ended();
                    refresh();
                    say(message);
                });
        running = Optional.of(background);
        solutions.searching(true);
        refresh();
        background.execute();
    }

    private void stop(String sentence) {
        if (running.isPresent()) {
            running.get().stop();
            ended();
            refresh();
            solutions.spots(sentence);
        }
    }

    private void ended() {
        running = Optional.empty();
        solutions.searching(false);
    }

    private void say(String sentence) {
        solutions.spots(sentence);
        IJ.showStatus(sentence);
    }

    private void closed() {
        stop("");
        crystal.closeWindows();
        calibrations.close();
        seeing.end();
        follower.end();
        Sitting.removeListener(sittings);
        open = null;
    }

    private void refresh() {
        Optional<ImagePlus> over = image();
        Sitting now = sitting();
        Optional<String> wrong = instrument.derive(over.orElse(null), now.placement());
        calibrations.refresh();
        boolean free = over.isPresent() && running.isEmpty();
        solutions.show(now.solutions(), now.chosen(), crystal.crystals().size() > 1);
        desk.refresh(over, now, free, crystal.crystals());
        hand.show(now.placement());
        seeing.refresh();
        hand.indices().setSelected(now.labelled());
        now.placement().map(Placement::crystal).ifPresent(crystal::show);
        solutions.wholeStack().setVisible(over.filter(i -> i.getStackSize() > 1).isPresent());
        solutions.findOrientation().setEnabled(free && wrong.isEmpty());
        hand.refine()
                .setEnabled(
                        free && now.measured().isPresent() && now.placement().isPresent());
        hand.back()
                .setEnabled(now.fit()
                        .filter(f -> now.chosen().filter(f::equals).isEmpty())
                        .isPresent());
        hand.undo().setEnabled(over.isPresent() && !History.of(over.get()).isEmpty());
        keep.show(over, now.chosen());
        Guide guide = Guide.of(over.isPresent(), running.isPresent(), wrong, now);
        frame.guide(over.map(ImagePlus::getTitle), guide);
    }
}
