package io.github.zonewright.document;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.indexing.Discrimination;
import java.util.List;
import java.util.Optional;

/**
 * What tells a fit from another answer, as it was found: words for a person, and the numbers behind them.
 *
 * @param other the other answer, in words
 * @param sentences why the two are alike, the spot to look for, the tilt with its cautions
 * @param spots the spots to look for on the image, the most telling first
 * @param tilt the rotation of the specimen in the microscope frame after which the two differ plainly: axis in the screen,
 *     right-handed, length in radians; empty when none was found
 */
public record ToldApart(
        String other, List<String> sentences, List<Discrimination.TellingSpot> spots, Optional<Vector3> tilt) {

    /** Copies the lists. */
    public ToldApart {
        sentences = List.copyOf(sentences);
        spots = List.copyOf(spots);
    }

    /**
     * Takes what is to be kept of a comparison.
     *
     * @param other the other answer, in words
     * @param found the comparison, of which the fit is the first answer
     * @return the same without its computed patterns
     */
    public static ToldApart of(String other, Discrimination found) {
        return new ToldApart(
                other, found.sentences(), found.spots(), found.tilt().map(Discrimination.Tilt::rotation));
    }
}
