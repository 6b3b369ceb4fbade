package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.imagej.session.AppliedCalibration;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.PresentCamera;
import java.util.Optional;
import java.util.function.Supplier;
import javax.swing.JFrame;

/** The windows that the instrument section opens for calibration, and what comes of them. */
final class CalibrationWindows {
    private final InstrumentSection section;
    private final Supplier<Optional<ImagePlus>> image;
    private Optional<RingWindow> rings = Optional.empty();
    private Optional<CalibrationsWindow> kept = Optional.empty();

    /**
     * The windows of a section.
     *
     * @param section the section
     * @param image the current image
     */
    CalibrationWindows(InstrumentSection section, Supplier<Optional<ImagePlus>> image) {
        this.section = section;
        this.image = image;
        section.calibrations().rings().addActionListener(e -> image.get().ifPresent(this::openRings));
        section.calibrations().manage().addActionListener(e -> openKept());
    }

    /** Says whether there is an image, and what of it may be kept. */
    void refresh() {
        section.calibrations().rings().setEnabled(image.get().isPresent());
        kept.filter(JFrame::isDisplayable).ifPresent(CalibrationsWindow::refresh);
    }

    void close() {
        rings.ifPresent(JFrame::dispose);
        kept.ifPresent(JFrame::dispose);
    }

    private void openRings(ImagePlus over) {
        rings.ifPresent(JFrame::dispose);
        Instrument said = section.instrument().orElse(Instrument.last());
        rings = Optional.of(new RingWindow(over, said, (use, binning) -> {
            if (image.get().filter(i -> i == over).isPresent()) {
                section.use(use, binning);
            } else {
                Instrument.of(over).orElse(said).with(use, binning).keepWith(over);
                section.use(AppliedCalibration.of(use.calibration()), binning);
            }
        }));
        Looks.beside(section, rings.get());
    }

    private void openKept() {
        if (kept.filter(JFrame::isDisplayable).isEmpty()) {
            kept = Optional.of(new CalibrationsWindow(
                    section.instrument().orElse(Instrument.last()),
                    () -> image.get().flatMap(PresentCamera::of),
                    c -> section.choose(Optional.of(AppliedCalibration.of(c)))));
            Looks.beside(section, kept.get());
        }
        kept.get().toFront();
    }
}
