package io.github.zonewright.spots;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/**
 * The spots of a pattern, as found or as a person changed them, and the direct beam and the centres that follow from them.
 * Immutable.
 */
final class SpotChoice {

    /** No nearer to the centre than this many spot widths is a spot believed, unless a person put it there. */
    private static final double NEAR_CENTRE = 3;

    private final List<MeasuredSpot> all;
    private final Set<MeasuredSpot> byHand;
    private final Optional<PatternCentre> centreByHand;
    private final Optional<MeasuredSpot> beamByHand;
    private final Optional<GlowCentre> glow;
    private final double sigma;

    private final List<CentreCandidate> centres;
    private final Optional<MeasuredSpot> directBeam;
    private final List<MeasuredSpot> spots;

    /**
     * @param all the spots that were found, the direct beam perhaps among them
     * @param glow what the background says about the centre
     * @param sigma width of the spots in pixels
     */
    SpotChoice(List<MeasuredSpot> all, Optional<GlowCentre> glow, double sigma) {
        this(all, Set.of(), Optional.empty(), Optional.empty(), glow, sigma);
    }

    private SpotChoice(
            List<MeasuredSpot> all,
            Set<MeasuredSpot> byHand,
            Optional<PatternCentre> centreByHand,
            Optional<MeasuredSpot> beamByHand,
            Optional<GlowCentre> glow,
            double sigma) {
        this.all = List.copyOf(all);
        this.byHand = Set.copyOf(byHand);
        this.centreByHand = centreByHand;
        this.beamByHand = beamByHand;
        this.glow = glow;
        this.sigma = sigma;
        List<MeasuredSpot> rest = new ArrayList<>(all);
        beamByHand.filter(beam -> !rest.contains(beam)).ifPresent(rest::add);
        centres = centreByHand
                .map(centre -> List.of(new CentreCandidate(centre, 0)))
                .orElseGet(() -> new CentreSearch(all, glow, sigma).candidates());
        directBeam = beamByHand.or(() -> beam(rest, centres));
        directBeam.ifPresent(rest::remove);
        if (!centres.isEmpty()) {
            PatternCentre centre = centres.get(0).centre();
            rest.removeIf(spot ->
                    !byHand.contains(spot) && spot.position().distanceTo(centre.position()) < NEAR_CENTRE * sigma);
        }
        rest.sort(Comparator.comparingDouble(MeasuredSpot::intensity).reversed());
        spots = List.copyOf(rest);
    }

    private Optional<MeasuredSpot> beam(List<MeasuredSpot> among, List<CentreCandidate> candidates) {
        return candidates.stream()
                .limit(1)
                .map(CentreCandidate::centre)
                .filter(centre -> centre.source() == PatternCentre.Source.DIRECT_BEAM)
                .flatMap(centre -> among.stream()
                        .filter(spot -> spot.position().distanceTo(centre.position())
                                <= Math.max(2 * sigma, 4 * spot.positionError())))
                .max(Comparator.comparingDouble(MeasuredSpot::intensity));
    }

    List<CentreCandidate> centres() {
        return centres;
    }

    Optional<MeasuredSpot> directBeam() {
        return directBeam;
    }

    /** The diffracted spots, the most intense first. */
    List<MeasuredSpot> spots() {
        return spots;
    }

    boolean isByHand(MeasuredSpot spot) {
        return byHand.contains(spot);
    }

    boolean isCentreByHand() {
        return centreByHand.isPresent();
    }

    SpotChoice with(MeasuredSpot spot) {
        List<MeasuredSpot> more = new ArrayList<>(all);
        if (!more.contains(spot)) {
            more.add(spot);
        }
        Set<MeasuredSpot> hand = new HashSet<>(byHand);
        hand.add(spot);
        return new SpotChoice(more, hand, centreByHand, beamByHand, glow, sigma);
    }

    /** Without a spot; without the direct beam the centre that a person put on it is forgotten too. */
    SpotChoice without(MeasuredSpot spot) {
        List<MeasuredSpot> fewer = new ArrayList<>(all);
        fewer.remove(spot);
        Set<MeasuredSpot> hand = new HashSet<>(byHand);
        hand.remove(spot);
        boolean beam = beamByHand.filter(spot::equals).isPresent();
        return new SpotChoice(
                fewer, hand, beam ? Optional.empty() : centreByHand, beam ? Optional.empty() : beamByHand, glow, sigma);
    }

    SpotChoice withCentre(PatternCentre centre) {
        return new SpotChoice(all, byHand, Optional.of(centre), Optional.empty(), glow, sigma);
    }

    SpotChoice withBeam(MeasuredSpot beam) {
        PatternCentre centre = new CentreSearch(all, glow, sigma).on(beam);
        return new SpotChoice(all, byHand, Optional.of(centre), Optional.of(beam), glow, sigma);
    }

    SpotChoice withFoundCentre() {
        return new SpotChoice(all, byHand, Optional.empty(), Optional.empty(), glow, sigma);
    }
}
