package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.overlay.IndexLabel;
import io.github.zonewright.imagej.overlay.PatternView;
import io.github.zonewright.imagej.overlay.SpotNote;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/** What is known of the spot at which a person points: indices, spacing, and how far measured and computed place differ. */
public final class SpotReading {
    private SpotReading() {}

    /**
     * Reads the spot at a place of an image on which a pattern lies.
     *
     * @param image the image
     * @param at where a person points, in px
     * @param reach how far off a spot the place may be, in px
     * @return what is to stand beside the spot; empty where there is none, or no pattern
     */
    public static Optional<SpotNote> at(ImagePlus image, PixelPoint at, double reach) {
        Sitting sitting = Sitting.of(image);
        if (sitting.placement().isEmpty()) {
            return Optional.empty();
        }
        Placement laid = sitting.placement().get();
        PatternView view = sitting.view(image);
        Optional<PlacedSpot> computed = view.computed().stream()
                .filter(s -> s.position().distanceTo(at) <= reach)
                .min(Comparator.comparingDouble(s -> s.position().distanceTo(at)));
        if (computed.isPresent()) {
            return computed.map(s -> computed(sitting, laid, s, reach));
        }
        return sitting.measured().flatMap(m -> SpotPick.near(m, at, reach)).map(m -> measured(laid, m));
    }

    private static SpotNote computed(Sitting sitting, Placement laid, PlacedSpot spot, double reach) {
        Hkl hkl = spot.spot().hkl();
        Crystal crystal = laid.crystal();
        Optional<MeasuredSpot> measured = measured(sitting, spot, reach);
        List<String> lines = new ArrayList<>();
        lines.add(spacing(1 / crystal.lattice().reciprocal().vector(hkl).norm())
                + (hkl.dot(laid.setting().zone()) == 0 ? "" : ", upper layer"));
        lines.add(measured.map(m -> m.position().minus(spot.position()))
                .map(d -> text("measured − computed %+.2f, %+.2f px", d.x(), d.y()))
                .orElse(sitting.measured().isPresent() ? "not measured" : "spots are not measured yet"));
        return new SpotNote(
                measured.map(MeasuredSpot::position).orElse(spot.position()), IndexLabel.shown(hkl, crystal), lines);
    }

    /** The measured spot that the solution assigns to a reflection; without a solution, the nearest within reach. */
    private static Optional<MeasuredSpot> measured(Sitting sitting, PlacedSpot spot, double reach) {
        if (sitting.chosen().isPresent()) {
            return sitting.chosen().get().matches().stream()
                    .filter(m -> m.hkl().equals(spot.spot().hkl()))
                    .map(SpotMatch::measured)
                    .findFirst();
        }
        Optional<MeasuredPattern> pattern = sitting.measured();
        return pattern.flatMap(m -> SpotPick.near(m, spot.position(), reach));
    }

    private static SpotNote measured(Placement laid, MeasuredSpot spot) {
        Vector2 g = laid.camera().toReciprocal(spot.position(), laid.beam().wavelength());
        return new SpotNote(
                spot.position(),
                new int[0],
                List.of("not explained", g.norm() == 0 ? "direct beam" : spacing(1 / g.norm())));
    }

    private static String spacing(double angstroms) {
        LengthUnit unit = LengthUnit.last();
        return text("d %." + (unit == LengthUnit.ANGSTROM ? 3 : 4) + "f ", unit.of(angstroms)) + unit.label();
    }

    private static String text(String format, Object... values) {
        return String.format(Locale.ROOT, format, values);
    }
}
