package io.github.zonewright.imagej.workbench;

import ij.IJ;
import ij.ImagePlus;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.session.Figures;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.imagej.session.SpotPick;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.PatternCentre;
import io.github.zonewright.spots.SpotEdit;
import java.awt.Cursor;
import java.awt.event.MouseEvent;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** Adds, moves and removes measured spots, and sets the centre; each comes to rest on the peak nearby. */
final class SpotsHand implements Hand {
    /** A press that moved less than so many screen px is a click. */
    private static final double CLICK = 3;

    /** What was pressed: where, and whether at the centre or at a spot. */
    private record Grip(ImagePlus image, PixelPoint from, boolean centre, boolean spot) {}

    private Optional<Grip> grip = Optional.empty();

    @Override
    public void press(ImagePlus image, PixelPoint at, MouseEvent event) {
        grip = Optional.empty();
        Optional<MeasuredPattern> measured = Sitting.of(image).measured();
        if (measured.isEmpty()) {
            IJ.showStatus("Find the spots of this image first.");
            return;
        }
        if (event.isAltDown()) {
            edit(image, new SpotEdit(SpotEdit.Way.REMOVE, at, Optional.empty()));
            return;
        }
        boolean centre = isAtCentre(image, measured.get(), at);
        boolean spot = !centre && isAtSpot(measured.get(), at);
        grip = Optional.of(new Grip(image, at, centre, spot));
    }

    @Override
    public void drag(ImagePlus image, PixelPoint at, MouseEvent event) {
        if (grip.filter(g -> g.image() == image && (g.centre() || g.spot())).isPresent()) {
            IJ.showStatus((grip.get().centre() ? "Centre to " : "Spot to ") + Reading.fixed(at.x(), 1) + ", "
                    + Reading.fixed(at.y(), 1) + " px");
        }
    }

    @Override
    public void release(ImagePlus image, PixelPoint at, MouseEvent event) {
        Optional<Grip> held = grip.filter(g -> g.image() == image);
        grip = Optional.empty();
        if (held.isEmpty()) {
            return;
        }
        Grip g = held.get();
        boolean click = g.from().distanceTo(at) * image.getCanvas().getMagnification() < CLICK;
        if (g.centre() && !click) {
            edit(image, new SpotEdit(SpotEdit.Way.CENTRE, at, Optional.empty()));
        } else if (g.spot() && !click) {
            edit(image, new SpotEdit(SpotEdit.Way.MOVE, g.from(), Optional.of(at)));
        } else if (!g.centre() && !g.spot() && click) {
            edit(image, new SpotEdit(SpotEdit.Way.ADD, at, Optional.empty()));
        }
    }

    @Override
    public Integer cursor(ImagePlus image, PixelPoint at, MouseEvent event) {
        return Sitting.of(image)
                .measured()
                .map(m -> isAtCentre(image, m, at) || isAtSpot(m, at) ? Cursor.MOVE_CURSOR : Cursor.CROSSHAIR_CURSOR)
                .orElse(null);
    }

    private static void edit(ImagePlus image, SpotEdit edit) {
        Sitting before = Sitting.of(image);
        try {
            Sitting after = before.withEdited(edit);
            History.of(image).keep(image);
            after.show(image);
            record(edit);
        } catch (IllegalArgumentException e) {
            IJ.showStatus(e.getMessage());
        }
    }

    private static void record(SpotEdit edit) {
        List<Recording.Option> options = new ArrayList<>();
        options.add(new Recording.Option("edit", edit.way().label()));
        options.add(new Recording.Option("x", Figures.place(edit.place().x())));
        options.add(new Recording.Option("y", Figures.place(edit.place().y())));
        edit.to().ifPresent(to -> {
            options.add(new Recording.Option("tox", Figures.place(to.x())));
            options.add(new Recording.Option("toy", Figures.place(to.y())));
        });
        Recording.of("Edit Spots...", options);
    }

    private static boolean isAtCentre(ImagePlus image, MeasuredPattern measured, PixelPoint at) {
        double zoom = image.getCanvas().getMagnification();
        return measured.centre()
                .map(PatternCentre::position)
                .filter(c -> c.distanceTo(at) * zoom < HandTool.GRIP)
                .isPresent();
    }

    private static boolean isAtSpot(MeasuredPattern measured, PixelPoint at) {
        return SpotPick.near(measured, at, SpotPick.reach(measured)).isPresent();
    }
}
