package io.github.zonewright.document;

import io.github.zonewright.image.Mask;
import io.github.zonewright.spots.SpotEdit;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.TreeSet;

/**
 * What a person set by hand for the image of a fit: how it is measured and how it is shown.
 *
 * @param thickness foil thickness in Å that the shown intensities are computed for; empty when not known
 * @param darkSpots whether spots are dark on bright ground, if a person said so
 * @param hidden the hidden area, if a person set it; in its frame, which is the image's
 * @param edits the changes of the measured spots and their centre, in order
 * @param shown codes of what is drawn beside the spots, in lower case
 */
public record FitHandling(
        OptionalDouble thickness,
        Optional<Boolean> darkSpots,
        Optional<Mask> hidden,
        List<SpotEdit> edits,
        Set<String> shown) {

    static final String CODE = "[a-z_]+";

    /** Nothing is set. */
    public static final FitHandling NONE =
            new FitHandling(OptionalDouble.empty(), Optional.empty(), Optional.empty(), List.of(), Set.of());

    /**
     * Copies list and set.
     *
     * @throws IllegalArgumentException if the thickness is not above 0 Å, or a code is not of lower-case letters and
     *     underscores
     */
    public FitHandling {
        thickness.ifPresent(t -> {
            if (!(t > 0) || Double.isInfinite(t)) {
                throw new IllegalArgumentException("foil thickness: " + t + " Å, expected a finite value above 0 Å");
            }
        });
        edits = List.copyOf(edits);
        shown = Collections.unmodifiableSet(new TreeSet<>(shown));
        for (String code : shown) {
            if (!code.matches(CODE)) {
                throw new IllegalArgumentException(
                        "code of a shown mark: '" + code + "', expected lower-case letters and underscores");
            }
        }
    }
}
