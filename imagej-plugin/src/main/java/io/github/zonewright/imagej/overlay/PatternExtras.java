package io.github.zonewright.imagej.overlay;

import io.github.zonewright.image.PixelPoint;
import java.util.List;
import java.util.Set;

/**
 * What is drawn about a pattern beyond its spots.
 *
 * @param shown which of the marks
 * @param nanometres whether the scale bar is in 1/nm; in 1/Å else
 * @param doubled where double diffraction may light forbidden spots, in px
 */
public record PatternExtras(Set<ShownMarks> shown, boolean nanometres, List<PixelPoint> doubled) {
    /** Nothing else. */
    public static final PatternExtras NONE = new PatternExtras(Set.of(), false, List.of());

    /** Copies set and list. */
    public PatternExtras {
        shown = Set.copyOf(shown);
        doubled = List.copyOf(doubled);
    }

    /** Whether one of the marks is drawn. */
    boolean has(ShownMarks mark) {
        return shown.contains(mark);
    }

    /** The same with forbidden spots elsewhere. */
    PatternExtras withDoubled(List<PixelPoint> places) {
        return new PatternExtras(shown, nanometres, places);
    }
}
