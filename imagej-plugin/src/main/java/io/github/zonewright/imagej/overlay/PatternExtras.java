package io.github.zonewright.imagej.overlay;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.ResidualPlot;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/**
 * What is drawn about a pattern beyond its spots.
 *
 * @param shown which of the marks
 * @param nanometres whether the scale bar is in 1/nm; in 1/Å else
 * @param doubled where double diffraction may light forbidden spots, in px
 * @param residuals the residuals, if there are any and they are drawn
 */
public record PatternExtras(
        Set<ShownMarks> shown, boolean nanometres, List<PixelPoint> doubled, Optional<ResidualPlot> residuals) {
    /** Nothing else. */
    public static final PatternExtras NONE = new PatternExtras(Set.of(), false, List.of(), Optional.empty());

    /** Copies set and list. */
    public PatternExtras {
        shown = Set.copyOf(shown);
        doubled = List.copyOf(doubled);
    }

    /** Whether one of the marks is drawn. */
    boolean has(ShownMarks mark) {
        return shown.contains(mark);
    }

    /** The same on an image stretched by a factor. */
    PatternExtras scaled(double factor) {
        List<PixelPoint> places = doubled.stream()
                .map(p -> new PixelPoint(factor * p.x(), factor * p.y()))
                .toList();
        return new PatternExtras(shown, nanometres, places, residuals.map(r -> r.scaled(factor)));
    }
}
