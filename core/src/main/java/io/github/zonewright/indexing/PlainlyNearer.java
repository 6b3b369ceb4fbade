package io.github.zonewright.indexing;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.Collection;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;

/**
 * Whether another solution puts the same spots nearer than a solution does, beyond what the spots' errors and a usual lens
 * allow. Residuals are not judged by themselves: those of wide discs are larger than their errors say.
 */
final class PlainlyNearer {

    /** By this factor the other solution's χ² must be smaller. */
    private static final double FACTOR = 2;

    private PlainlyNearer() {}

    /** In words, that another solution explains the same spots and places them plainly nearer; empty where it does not. */
    static Optional<String> than(Solution s, Solution other) {
        Map<MeasuredSpot, SpotMatch> others = new HashMap<>();
        other.matches().forEach(m -> others.put(m.measured(), m));
        List<SpotMatch> own = s.matches().stream()
                .filter(m -> others.containsKey(m.measured()))
                .toList();
        List<SpotMatch> theirs = own.stream().map(m -> others.get(m.measured())).toList();
        PixelPoint centre = s.placement().camera().centre();
        double chi2 = chi2(own, centre);
        double theirChi2 = chi2(theirs, centre);
        boolean nearer = chi2 > FACTOR * theirChi2 && (chi2 - theirChi2) / 2 > Verdict.LEAD;
        int missed = s.matches().size() - own.size();
        return missed > s.matches().size() / 10 || !nearer
                ? Optional.empty()
                : Optional.of(String.format(
                        Locale.ROOT,
                        "[%s] of %s places the same spots plainly nearer, to %.2f px in place of %.2f px, though its intensities"
                                + " fit less well.",
                        other.placement().setting().zone(),
                        other.placement().crystal().name(),
                        other.rmsResidual(),
                        s.rmsResidual()));
    }

    private static double chi2(Collection<SpotMatch> matches, PixelPoint centre) {
        return matches.stream()
                .mapToDouble(m -> m.residual()
                        * m.residual()
                        / PositionScore.variance(
                                m.measured().positionError(),
                                m.measured().position().distanceTo(centre),
                                0))
                .sum();
    }
}
