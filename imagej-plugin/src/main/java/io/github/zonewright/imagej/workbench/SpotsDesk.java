package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import ij.gui.Plot;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.bridge.NetTable;
import io.github.zonewright.imagej.command.IntensityPlot;
import io.github.zonewright.imagej.command.IntensityProfile;
import io.github.zonewright.imagej.command.MeasurementAnswer;
import io.github.zonewright.imagej.session.Figures;
import io.github.zonewright.imagej.session.Ground;
import io.github.zonewright.imagej.session.HiddenArea;
import io.github.zonewright.imagej.session.LengthUnit;
import io.github.zonewright.imagej.session.Measurement;
import io.github.zonewright.imagej.session.Ruler;
import io.github.zonewright.imagej.session.RulerPoint;
import io.github.zonewright.imagej.session.Search;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotContrast;
import io.github.zonewright.spots.SpotNet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Consumer;
import java.util.function.Supplier;
import java.util.function.UnaryOperator;
import javax.swing.SwingUtilities;

/** What the section of the measured spots does with the current image. */
final class SpotsDesk {
    private final SpotsSection section;
    private final Supplier<Optional<ImagePlus>> current;
    private final Consumer<UnaryOperator<Sitting>> change;
    private final Consumer<Measurement.How> measure;
    private final Consumer<String> say;
    private Optional<Drawn> drawn = Optional.empty();

    /** With what the readings on an image were worked out. */
    private record Drawn(ImagePlus image, Ruler ruler) {}

    /**
     * A desk.
     *
     * @param section what it serves
     * @param current gives the current image
     * @param change changes what is known of it, so that it can be taken back
     * @param measure measures it anew, in the way it is given
     * @param say says why something can't be done
     */
    SpotsDesk(
            SpotsSection section,
            Supplier<Optional<ImagePlus>> current,
            Consumer<UnaryOperator<Sitting>> change,
            Consumer<Measurement.How> measure,
            Consumer<String> say) {
        this.section = section;
        this.current = current;
        this.change = change;
        this.measure = measure;
        this.say = say;
        section.findSpots().addActionListener(e -> with(image -> measure.accept(how(image))));
        section.table().addActionListener(e -> with(this::table));
        section.dark()
                .addActionListener(e ->
                        again(h -> h.withDarkSpots(Optional.of(section.dark().isSelected()))));
        section.shown().addActionListener(e -> {
            change(m -> m.withShown(section.shown().isSelected()));
            with(SeeingSection::record);
        });
        section.onUnit(this::unit);
        section.onMode(this::mode);
        section.ruler().onClear(() -> {
            change(Measurement::withoutRuler);
            Recording.flag("Measure Spacing...", "clear");
        });
        SpotsSection.menu(section.hidden(), hiddenItems());
        SpotsSection.menu(section.profile(), profileItems());
    }

    private Map<String, Runnable> hiddenItems() {
        Map<String, Runnable> items = new LinkedHashMap<>();
        for (HiddenArea.Way way : HiddenArea.Way.values()) {
            items.put(way.label(), () -> with(image -> hide(image, way)));
        }
        return items;
    }

    private Map<String, Runnable> profileItems() {
        Map<String, Runnable> items = new LinkedHashMap<>();
        items.put("Along a", () -> with(image -> along(image, true)));
        items.put("Along b", () -> with(image -> along(image, false)));
        items.put("Through the last spot of the ruler", () -> with(this::throughRuler));
        items.put("About the centre", () -> with(this::about));
        return items;
    }

    /** Shows what is known of an image. */
    void refresh(Optional<ImagePlus> image, Sitting sitting, boolean free, List<Crystal> crystals) {
        Measurement measurement = sitting.measurement();
        boolean measured = measurement.pattern().isPresent();
        section.findSpots().setEnabled(free);
        section.table().setEnabled(measured);
        section.profile().setEnabled(measured);
        section.hidden().setEnabled(free);
        section.dark().setEnabled(free);
        section.dark().setSelected(measurement.how().isDark());
        section.ask(
                ground(measurement.how()),
                measurement.how().judged().map(SpotContrast::reason).orElse(""));
        section.shown().setEnabled(measured && sitting.placement().isPresent());
        section.shown()
                .setSelected(
                        measured && (measurement.shown() || sitting.placement().isEmpty()));
        if (image.isEmpty()) {
            section.say(List.of(""));
            section.summary("");
            return;
        }
        Ruler ruler = Ruler.of(image.get(), sitting);
        section.say(
                measured
                        ? MeasurementAnswer.lines(
                                measurement.pattern().get(), measurement.net().orElseThrow(), ruler)
                        : List.of("Nothing is measured on this image yet."));
        section.summary(
                measurement.pattern().map(m -> m.spots().size() + " spots").orElse(""));
        redraw(image.get(), ruler, measurement);
        section.ruler().show(image.get().getTitle(), ruler, ruler.readings(measurement.ruler()), crystals);
    }

    /** Draws the readings again when another scale or centre has changed them. */
    private void redraw(ImagePlus image, Ruler ruler, Measurement measurement) {
        Drawn now = new Drawn(image, ruler);
        boolean changed =
                drawn.filter(d -> d.image() == image && !d.equals(now)).isPresent();
        drawn = Optional.of(now);
        if (changed && !measurement.ruler().isEmpty()) {
            SwingUtilities.invokeLater(() -> Sitting.of(image).show(image));
        }
    }

    private static String ground(Measurement.How how) {
        if (how.isDoubtful()) {
            return "Perhaps they are: tick if so.";
        }
        return how.isDark() && how.said().isEmpty() ? "So it seems: untick if not." : "";
    }

    private void with(Consumer<ImagePlus> action) {
        current.get().ifPresent(image -> {
            try {
                action.accept(image);
            } catch (IllegalArgumentException e) {
                say.accept(e.getMessage());
            }
        });
    }

    private void change(UnaryOperator<Measurement> how) {
        change.accept(s -> s.withMeasurement(how.apply(s.measurement())));
    }

    private static Measurement.How how(ImagePlus image) {
        return Sitting.of(image).measurement().how();
    }

    /** Measures in another way what was measured; what was not is measured so when it comes to that. */
    private void again(UnaryOperator<Measurement.How> other) {
        with(image -> {
            if (Sitting.of(image).measured().isPresent()) {
                measure.accept(other.apply(how(image)));
            } else {
                change(m -> m.withHow(other.apply(m.how())));
            }
        });
    }

    /** Records that an image was measured. */
    static void record(Measurement.How how) {
        record(how, true);
    }

    /** Records that an image was measured, to draw it or to list it. */
    private static void record(Measurement.How how, boolean draw) {
        Recording.of(
                "Measure Net...",
                List.of(
                        new Recording.Option("ground", Ground.of(how).label()),
                        new Recording.Option("draw", Boolean.toString(draw)),
                        new Recording.Option("table", Boolean.toString(!draw))));
    }

    private static void recordProfile(String profile, PixelPoint spot) {
        Recording.of(
                "Intensity Profile...",
                List.of(
                        new Recording.Option("profile", profile),
                        new Recording.Option("x", Figures.place(spot.x())),
                        new Recording.Option("y", Figures.place(spot.y()))));
    }

    private void unit(LengthUnit unit) {
        unit.remember();
        with(image -> {
            Sitting.of(image).show(image);
            SeeingSection.record(image);
        });
    }

    private void mode(HandMode mode) {
        HandTool.use(mode);
        HandTool.pickUp();
        boolean drawn = mode != HandMode.PATTERN;
        with(image -> {
            Sitting now = Sitting.of(image);
            if (now.measured().isPresent() && now.measurement().shown() != drawn) {
                now.withMeasurement(now.measurement().withShown(drawn)).show(image);
                SeeingSection.record(image);
            }
        });
    }

    private void hide(ImagePlus image, HiddenArea.Way way) {
        if (way == HiddenArea.Way.TO_SELECTION) {
            HiddenArea.select(image);
        } else {
            Optional<Mask> area = HiddenArea.area(image, way);
            again(h -> h.withHidden(area));
        }
        Recording.of("Hidden Area...", List.of(new Recording.Option("area", way.label())));
    }

    private void table(ImagePlus image) {
        Sitting sitting = Sitting.of(image);
        sitting.measured()
                .ifPresent(m -> NetTable.of(
                                sitting.measurement().net().orElseThrow(),
                                m.spots(),
                                m::isByHand,
                                Ruler.of(image, sitting).spacings())
                        .show("Measured spots of " + image.getTitle()));
        record(sitting.measurement().how(), false);
    }

    private void along(ImagePlus image, boolean first) {
        SpotNet net = Sitting.of(image).measurement().net().orElseThrow(SpotsDesk::unmeasured);
        Vector2 way;
        if (net instanceof SpotNet.Net found) {
            way = first ? found.a() : found.b();
        } else if (first && net instanceof SpotNet.SystematicRow row) {
            way = row.step();
        } else {
            throw new IllegalArgumentException("There is no such vector: the spots make no net.");
        }
        PixelPoint centre = net.refinedCentre()
                .orElseThrow(() -> new IllegalArgumentException("The net has no centre: set the centre by hand first."))
                .position();
        plot(image, centre.plus(way));
    }

    private void throughRuler(ImagePlus image) {
        List<RulerPoint> points = Sitting.of(image).measurement().ruler();
        if (points.isEmpty()) {
            throw new IllegalArgumentException("The ruler has not been laid yet: choose it, and click a spot.");
        }
        plot(image, points.get(points.size() - 1).place());
    }

    private void plot(ImagePlus image, PixelPoint spot) {
        Sitting sitting = Sitting.of(image);
        show(IntensityPlot.along(
                "Row of " + image.getTitle(),
                pixels(image, sitting),
                measured(sitting),
                Ruler.of(image, sitting),
                spot));
        recordProfile(IntensityProfile.ROW, spot);
    }

    private void about(ImagePlus image) {
        Sitting sitting = Sitting.of(image);
        show(IntensityPlot.about(
                "Profile of " + image.getTitle(), pixels(image, sitting), measured(sitting), Ruler.of(image, sitting)));
        recordProfile(IntensityProfile.CENTRE, new PixelPoint(0, 0));
    }

    private static GrayImage pixels(ImagePlus image, Sitting sitting) {
        return Search.pixels(image, sitting.measurement().how());
    }

    private static MeasuredPattern measured(Sitting sitting) {
        return sitting.measured().orElseThrow(SpotsDesk::unmeasured);
    }

    private static IllegalArgumentException unmeasured() {
        return new IllegalArgumentException("Find the spots of this image first.");
    }

    private static void show(Plot plot) {
        plot.show();
    }
}
