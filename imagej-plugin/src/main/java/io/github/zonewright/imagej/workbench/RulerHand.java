package io.github.zonewright.imagej.workbench;

import ij.IJ;
import ij.ImagePlus;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.session.Figures;
import io.github.zonewright.imagej.session.Measurement;
import io.github.zonewright.imagej.session.Ruler;
import io.github.zonewright.imagej.session.RulerPoint;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.imagej.session.SpotPick;
import io.github.zonewright.spots.MeasuredPattern;
import java.awt.Cursor;
import java.awt.event.MouseEvent;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** Lays the ruler at a spot that is clicked, or at a pair of spots g and −g clicked one after the other. */
final class RulerHand implements Hand {
    private int order = 1;
    private boolean pairs;
    private Optional<PixelPoint> first = Optional.empty();

    /** Which spot of its row the next one is. */
    void order(int number) {
        order = number;
    }

    /** Whether two clicks make a reading. */
    void pairs(boolean two) {
        pairs = two;
        first = Optional.empty();
    }

    @Override
    public void press(ImagePlus image, PixelPoint at, MouseEvent event) {
        Sitting sitting = Sitting.of(image);
        if (sitting.measured().isEmpty()) {
            IJ.showStatus("Find the spots of this image first.");
            return;
        }
        if (pairs && first.isEmpty()) {
            first = Optional.of(at);
            IJ.showStatus("Now click the opposite spot.");
            return;
        }
        MeasuredPattern measured = sitting.measured().get();
        double reach = Math.max(
                SpotPick.reach(measured), HandTool.GRIP / image.getCanvas().getMagnification() / 2);
        RulerPoint point = SpotPick.ruler(measured, first.orElse(at), first.map(p -> at), order, reach);
        first = Optional.empty();
        try {
            Ruler ruler = Ruler.of(image, sitting);
            IJ.showStatus(ruler.text(ruler.read(point)));
            History.of(image).keep(image);
            Measurement measurement = sitting.measurement();
            sitting.withMeasurement(measurement.withRuler(point)).show(image);
            record(point);
        } catch (IllegalArgumentException e) {
            IJ.showStatus(e.getMessage());
        }
    }

    @Override
    public void drag(ImagePlus image, PixelPoint at, MouseEvent event) {}

    @Override
    public void release(ImagePlus image, PixelPoint at, MouseEvent event) {}

    @Override
    public Integer cursor(ImagePlus image, PixelPoint at, MouseEvent event) {
        return Cursor.CROSSHAIR_CURSOR;
    }

    private static void record(RulerPoint point) {
        List<Recording.Option> options = new ArrayList<>();
        options.add(new Recording.Option("x1", Figures.place(point.place().x())));
        options.add(new Recording.Option("y1", Figures.place(point.place().y())));
        point.opposite().ifPresent(other -> {
            options.add(new Recording.Option("x2", Figures.place(other.x())));
            options.add(new Recording.Option("y2", Figures.place(other.y())));
        });
        options.add(new Recording.Option("order", Integer.toString(point.order())));
        Recording.of("Measure Spacing...", options);
    }
}
