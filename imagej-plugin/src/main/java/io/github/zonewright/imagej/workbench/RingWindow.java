package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import ij.Prefs;
import io.github.zonewright.calibration.MeasuredRings;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.calibration.RingCalibration;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.command.CrystalReport;
import io.github.zonewright.imagej.command.RingAnswer;
import io.github.zonewright.imagej.overlay.RingMarks;
import io.github.zonewright.imagej.session.AppliedCalibration;
import io.github.zonewright.imagej.session.CrystalOffer;
import io.github.zonewright.imagej.session.CrystalOffers;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.PresentCamera;
import io.github.zonewright.imagej.session.RingTrial;
import io.github.zonewright.microscope.Beam;
import java.awt.BorderLayout;
import java.io.IOException;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.BiConsumer;
import java.util.stream.Stream;
import javax.swing.BoxLayout;
import javax.swing.JButton;
import javax.swing.JFrame;
import javax.swing.JLabel;
import javax.swing.JPanel;
import javax.swing.JScrollPane;

/** Calibration from the rings of a known powder on one image: what is assumed, what comes of it, and how well it fits. */
final class RingWindow extends JFrame {
    private static final long serialVersionUID = 1L;
    private static final String STANDARD = "zonewright.standard";
    private static final int WIDTH = 590;
    private static final int HEIGHT = 1030;
    private static final int TEXT_HEIGHT = 116;
    private static final int MOST_OFFERS = 3;
    private static final double PERCENT = 0.01;

    private final CrystalPicker picker = new CrystalPicker();
    private final CheckedField<OptionalDouble> rough =
            new CheckedField<>("rough camera constant", 8, Reading.optional(1e-3, 1e8));
    private final CheckedField<Double> good = new CheckedField<>("rough good to", 4, Reading.number(0.1, 20));
    private final JLabel assumed = Looks.quiet(" ");
    private final JButton measure = new JButton("Measure rings");
    private final JButton use = new JButton("Use it");
    private final JPanel others = new JPanel();
    private final CrystalText text = new CrystalText("ring text", TEXT_HEIGHT);
    private final RingView view = new RingView();
    private final KeepPanel keep = new KeepPanel("Keep it for other images");
    private final transient BiConsumer<AppliedCalibration, Integer> onUse;
    private final transient ImagePlus image;
    private final transient Beam beam;
    private final boolean mirrored;
    private transient Optional<Crystal> standard = Optional.empty();
    private transient Optional<MeasuredRings> measured = Optional.empty();
    private transient Optional<RingCalibration.Fitted> found = Optional.empty();
    /** What was kept of these rings, which to use again is no reason to take its name away. */
    private transient Optional<AppliedCalibration> named = Optional.empty();

    private transient Optional<Background<?>> running = Optional.empty();

    /**
     * A window for an image.
     *
     * @param image the image with the rings
     * @param known what is said of the instrument
     * @param onUse is given the calibration and the image's binning when the person says to use it
     */
    RingWindow(ImagePlus image, Instrument known, BiConsumer<AppliedCalibration, Integer> onUse) {
        super("Rings of " + image.getTitle());
        this.image = image;
        this.beam = known.beam();
        this.mirrored = known.mirrored();
        this.onUse = onUse;
        setName("rings window");
        setDefaultCloseOperation(DISPOSE_ON_CLOSE);
        for (JButton button : new JButton[] {measure, use}) {
            button.setFont(Looks.text());
            button.setName(button.getText());
        }
        picker.setName("standard");
        picker.setToolTipText("The powder: one in common use, or any crystal of the shelf or of your own");
        picker.source(RingWindow::offers);
        picker.onPick(this::pick);
        rough.setToolTipText("About what the camera constant is; blank where it is not known");
        good.setToolTipText("How far the rough constant may be off");
        good.show("5");
        measure.setToolTipText("Reads the image again");
        use.setToolTipText(
                "Takes camera constant, ellipse, mirror and centre for this image, and the scale for the next");
        others.setLayout(new BoxLayout(others, BoxLayout.X_AXIS));
        Section ask = new Section("Calibration from rings");
        ask.row("Standard", picker);
        ask.row("Rough constant", rough, Looks.label("px·Å,  good to"), good, Looks.label("%"), rough.reasonLabel());
        ask.wide(assumed);
        ask.wide(text);
        ask.wide(Section.line(use, measure, others));
        ask.wide(view);
        JPanel body = new JPanel();
        body.setLayout(new BoxLayout(body, BoxLayout.Y_AXIS));
        body.add(ask);
        body.add(keep);
        JPanel top = new JPanel(new BorderLayout());
        top.add(body, BorderLayout.NORTH);
        JScrollPane scroll = new JScrollPane(top);
        scroll.setBorder(null);
        scroll.setHorizontalScrollBarPolicy(JScrollPane.HORIZONTAL_SCROLLBAR_NEVER);
        scroll.getVerticalScrollBar().setUnitIncrement(16);
        add(scroll, BorderLayout.CENTER);
        keep.suggest(known);
        rough.onChange(this::judge);
        good.onChange(this::judge);
        measure.addActionListener(e -> {
            measure();
            record(false);
        });
        use.addActionListener(e -> use());
        keep.onKept(kept -> {
            named = Optional.of(new AppliedCalibration(
                    kept,
                    kept.setting().cameraLength(),
                    kept.setting().pixelSize(),
                    found.map(f -> f.camera().centre())));
            onUse.accept(named.get(), kept.setting().binning());
            record(true);
        });
        getRootPane().setDefaultButton(use);
        pack();
        setSize(WIDTH, Math.min(HEIGHT, getToolkit().getScreenSize().height - 80));
        CrystalOffers now = offers();
        now.named(Prefs.get(STANDARD, RingTrial.POWDERS.get(0)))
                .or(() -> now.named(RingTrial.POWDERS.get(0)))
                .ifPresent(this::take);
        measure();
    }

    /** The powders in common use, then all else there is, without the lists. */
    private static CrystalOffers offers() {
        CrystalOffers now = CrystalOffers.now(List.of());
        Stream<CrystalOffer> first = RingTrial.POWDERS.stream().flatMap(n -> now.named(n).stream());
        List<CrystalOffer> all = Stream.concat(first, now.offers().stream())
                .filter(o -> !(o instanceof CrystalOffer.Group))
                .distinct()
                .toList();
        return new CrystalOffers(all, now.troubles());
    }

    private void pick(CrystalOffer offer) {
        if (take(offer)) {
            Prefs.set(STANDARD, offer.name());
            judge();
        }
    }

    private boolean take(CrystalOffer offer) {
        try {
            standard = offer.read().crystals().stream().findFirst();
            picker.show(offer.name());
            return standard.isPresent();
        } catch (IOException | IllegalArgumentException e) {
            text.refuse(offer.name() + ": " + e.getMessage());
            return false;
        }
    }

    private void measure() {
        start(() -> RingTrial.measure(image), rings -> {
            measured = Optional.of(rings);
            judge();
        });
    }

    /** Takes the rings that were measured for those of the standard, and shows what comes of it. */
    private void judge() {
        Optional<RingTrial> trial = trial();
        assumed.setText(assumption());
        if (trial.isPresent() && measured.isPresent()) {
            start(() -> trial.get().of(measured.get()), this::show);
        }
    }

    private Optional<RingTrial> trial() {
        return standard.filter(s -> rough.value().isPresent() && good.value().isPresent())
                .map(s -> new RingTrial(
                        s, beam, mirrored, rough.value().get(), good.value().get() * PERCENT));
    }

    private String assumption() {
        String with = String.format(
                Locale.ROOT, "At %s kV, image %smirrored. ", Reading.text(beam.kilovolts()), mirrored ? "" : "not ");
        OptionalDouble constant = rough.value().orElse(OptionalDouble.empty());
        if (constant.isEmpty() || good.value().isEmpty()) {
            return Looks.wrapped(
                    with + "Any camera constant may be right; powders of one structure type look alike then.",
                    WIDTH - 60);
        }
        double part = good.value().get() * PERCENT;
        return Looks.wrapped(
                with
                        + String.format(
                                Locale.ROOT,
                                "Assumed: a camera constant from %.5g to %.5g px·Å.",
                                constant.getAsDouble() * (1 - part),
                                constant.getAsDouble() * (1 + part)),
                WIDTH - 60);
    }

    private <T> void start(java.util.function.Supplier<T> work, java.util.function.Consumer<T> onDone) {
        running.ifPresent(Background::stop);
        use.setEnabled(false);
        measure.setEnabled(false);
        text.show(List.of("Measuring the rings …"), List.of());
        Background<T> background = new Background<>(
                (progress, stopped) -> work.get(),
                part -> {},
                result -> {
                    ended();
                    onDone.accept(result);
                },
                message -> {
                    ended();
                    refuse(message);
                });
        running = Optional.of(background);
        background.execute();
    }

    private void ended() {
        running = Optional.empty();
        measure.setEnabled(true);
    }

    private void show(RingCalibration calibration) {
        offerOthers(List.of());
        named = Optional.empty();
        if (calibration instanceof RingCalibration.Refused refused) {
            refuse(RingTrial.reason(refused));
            offerOthers(RingTrial.fitting(refused.others()));
            return;
        }
        RingCalibration.Fitted fitted = (RingCalibration.Fitted) calibration;
        found = Optional.of(fitted).filter(RingCalibration.Fitted::standardFits);
        List<String> line = new ArrayList<>();
        line.add(RingAnswer.line(fitted) + ImagePixels.note(image));
        CrystalReport report = CrystalReport.of(fitted.standard());
        List<String> notices = RingTrial.notices(fitted);
        if (found.isPresent()) {
            text.show(line, new CrystalReport(report.cautions(), List.of(), notices), report.notices());
        } else {
            List<String> wrong = new ArrayList<>(report.cautions());
            wrong.addAll(notices);
            text.show(List.of(), new CrystalReport(wrong, List.of(), List.of()), line);
            offerOthers(RingTrial.fitting(fitted.others()));
        }
        use.setEnabled(found.isPresent());
        keep.show(found.map(PresentCamera::of), "Nothing to keep: the rings do not fit the standard.");
        RingTrial.draw(fitted, image);
        view.show(measured.orElseThrow(), Optional.of(fitted));
    }

    private void refuse(String reason) {
        found = Optional.empty();
        text.refuse(reason + ImagePixels.note(image));
        use.setEnabled(false);
        keep.show(Optional.empty(), "Nothing to keep: no camera came of the rings.");
        RingMarks.clear(image);
        measured.ifPresent(m -> view.show(m, Optional.empty()));
    }

    /** One button for each powder that would fit. */
    private void offerOthers(List<String> names) {
        others.removeAll();
        for (String name : names.subList(0, Math.min(MOST_OFFERS, names.size()))) {
            JButton other = new JButton("Take " + name);
            other.setName("take " + name);
            other.setFont(Looks.text());
            other.addActionListener(e -> offers().named(name).ifPresent(this::pick));
            others.add(other);
        }
        others.revalidate();
        others.repaint();
    }

    private void use() {
        Optional<MicroscopeSetting> setting = keep.setting(beam.kilovolts());
        if (found.isPresent() && setting.isPresent()) {
            AppliedCalibration unnamed = RingTrial.applied(found.get(), getTitle(), setting.get());
            onUse.accept(named.orElse(unnamed), setting.get().binning());
            record(true);
        }
    }

    /** Records the calibration from these rings, used for the image or only looked at. */
    private void record(boolean used) {
        List<Recording.Option> all = new ArrayList<>();
        all.add(new Recording.Option("crystal", picker.shown()));
        all.add(new Recording.Option("kilovolts", Reading.text(beam.kilovolts())));
        all.add(new Recording.Option("roughscale", rough.getText().strip()));
        all.add(new Recording.Option("tolerance", good.getText().strip()));
        all.add(new Recording.Option("mirrored", Boolean.toString(mirrored)));
        all.add(new Recording.Option("table", "false"));
        all.add(new Recording.Option("plots", "false"));
        all.add(new Recording.Option("use", Boolean.toString(used)));
        if (used) {
            all.addAll(keep.options());
        }
        Recording.of("Calibrate from Rings...", all);
    }
}
