package io.github.zonewright.document;

import io.github.zonewright.indexing.Grain;
import java.util.List;
import java.util.Optional;

/**
 * What was found out on the image of a fit beside the fit.
 *
 * @param grains further crystals in what the fit leaves over, the surest first
 * @param apart what tells the fit from another answer, if that was asked
 */
public record FitFindings(List<Grain> grains, Optional<ToldApart> apart) {

    /** Nothing. */
    public static final FitFindings NONE = new FitFindings(List.of(), Optional.empty());

    /** Copies the list. */
    public FitFindings {
        grains = List.copyOf(grains);
    }
}
