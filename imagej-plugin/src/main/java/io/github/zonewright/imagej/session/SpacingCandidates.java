package io.github.zonewright.imagej.session;

import io.github.zonewright.calibration.SpacingList;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.overlay.IndexLabel;
import java.util.List;
import java.util.Locale;

/** Which {hkl} of the crystals at hand have a measured spacing. Keeps the list of spacings it was last asked for. */
public final class SpacingCandidates {
    private static final double PERCENT = 0.01;

    /** How much further than asked the list reaches, so that the next, slightly smaller spacing is on it too. */
    private static final double FURTHER = 0.8;

    private List<Crystal> crystals = List.of();
    private double least = Double.POSITIVE_INFINITY;
    private SpacingList spacings;

    /** Nothing listed yet. */
    public SpacingCandidates() {}

    /**
     * The candidates for a spacing.
     *
     * @param of the crystals
     * @param d the measured spacing in Å
     * @param tolerancePercent how far off a candidate may be, in %
     * @return the nearest first, allowed ones before forbidden ones
     * @throws IllegalArgumentException if the spacing is too small for the crystals' reflections to be listed
     */
    public synchronized List<SpacingList.Candidate> of(List<Crystal> of, double d, double tolerancePercent) {
        double wanted = d / (1 + PERCENT * tolerancePercent);
        if (!of.equals(crystals) || wanted < least) {
            spacings = SpacingList.of(of, FURTHER * wanted);
            crystals = List.copyOf(of);
            least = FURTHER * wanted;
        }
        return spacings.within(d, PERCENT * tolerancePercent);
    }

    /**
     * A candidate in words and numbers.
     *
     * @param candidate the candidate
     * @param d the measured spacing in Å
     * @param named whether its crystal is named
     * @return for example {@code {111} Copper +0.4 %}; forbidden ones in brackets
     */
    public static String text(SpacingList.Candidate candidate, double d, boolean named) {
        String form = "{" + IndexLabel.of(candidate.hkl()) + "}"
                + (named ? " " + candidate.crystal().name() : "");
        String text = String.format(Locale.ROOT, "%s %+.1f %%", form, candidate.deviation(d) / PERCENT);
        return candidate.absent() ? "(" + text + ", forbidden)" : text;
    }
}
