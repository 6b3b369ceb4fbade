package io.github.zonewright.indexing;

import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.PatternCentre;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.function.BooleanSupplier;

/**
 * Follows an orientation along a series. The best solutions of the last frame that had a settled or tied answer are refined
 * on the next, each with the camera constant and ellipse that its search gave, so that these do not creep from frame to
 * frame. Where the verdict is worse than it was, or many more
 * spots are left over, everything is searched anew.
 */
final class OrientationFollower {

    /** Nats by which a solution may lag and still be followed; one that lags further will not lead on a frame alike. */
    private static final double FAR_BEHIND = 40;

    /** A share of the spots explained that is smaller by so much than before asks for a search, whatever the verdict. */
    private static final double LARGEST_LOSS = 0.2;

    /** So does a number of explained spots that is a smaller part than this of what it was at the last search. */
    private static final double LEAST_LEFT = 0.75;

    private static final int LEAST_MATCHES = 4;
    private static final double SAME_ANSWER = Math.toRadians(1.5);

    /** A solution of the last frame, and the camera of the search that first gave it. */
    private record Lead(Solution solution, Camera camera) {}

    private final FrameSearch search;
    private List<Lead> leads = List.of();
    private int standing;
    private int searched;

    OrientationFollower(FrameSearch search) {
        this.search = search;
    }

    /** What was found on a frame, and whether without a search. */
    record Found(SearchResult result, boolean followed) {}

    /** The answer to the next frame. */
    Found next(MeasuredPattern pattern, BooleanSupplier cancelled) {
        List<Lead> refined = follow(pattern);
        SearchResult followed = result(refined, pattern);
        if (!refined.isEmpty() && standing(followed) >= standing && isAlike(refined.get(0).solution)) {
            leads = refined;
            standing = standing(followed);
            return new Found(followed, true);
        }
        SearchResult found = search.find(pattern, share -> {}, cancelled);
        if (standing(found) > 0) {
            standing = standing(found);
            leads = leads(found);
            searched = leads.get(0).solution.matches().size();
        }
        return new Found(found, false);
    }

    /** What may tie or lead on a frame alike: all that tie now, and what comes near. */
    private static List<Lead> leads(SearchResult found) {
        double least = found.solutions().get(0).score() - FAR_BEHIND;
        List<Solution> tied = Verdict.of(found) instanceof Verdict.Tied t ? t.solutions() : List.of();
        return found.solutions().stream()
                .filter(s -> s.score() > least || tied.contains(s))
                .map(s -> new Lead(s, s.placement().camera()))
                .toList();
    }

    /** Whether a frame shows about as much as those before, so that what could be told apart there is told apart here. */
    private boolean isAlike(Solution s) {
        return s.explainedFraction() > leads.get(0).solution.explainedFraction() - LARGEST_LOSS
                && s.matches().size() >= LEAST_LEFT * searched;
    }

    /** 2 for a settled answer, 1 for a tied one, 0 for an open one. */
    static int standing(SearchResult result) {
        Verdict verdict = Verdict.of(result);
        return verdict instanceof Verdict.Settled ? 2 : verdict instanceof Verdict.Tied ? 1 : 0;
    }

    private List<Lead> follow(MeasuredPattern pattern) {
        List<Lead> refined = new ArrayList<>();
        for (Lead lead : leads) {
            refined(lead, pattern)
                    .filter(s -> s.matches().size() >= LEAST_MATCHES
                            && s.score() >= OrientationSearch.LEAST_SCORE
                            && spansNet(s))
                    .map(s -> s.withOwnScore(lead.solution.ownScore()))
                    .ifPresent(s -> refined.add(new Lead(HalfTurn.near(s, lead.solution), lead.camera)));
        }
        refined.sort(Comparator.comparingDouble((Lead l) -> l.solution.score()).reversed());
        List<Lead> different = new ArrayList<>();
        for (Lead lead : refined) {
            if (different.stream().noneMatch(d -> isSame(d.solution, lead.solution))) {
                different.add(lead);
            }
        }
        return different;
    }

    /**
     * The solution refined at the centre measured here where the direct beam is seen. Where it is not, the spots may suit
     * several centres, and that of the frame before is taken unless it loses spots and another does better by far.
     */
    private static Optional<Solution> refined(Lead lead, MeasuredPattern pattern) {
        Placement before = lead.solution.placement();
        Placement there =
                before.withCamera(lead.camera.withCentre(before.camera().centre()));
        Optional<PatternCentre> here = pattern.centre();
        if (here.filter(c -> c.source() == PatternCentre.Source.DIRECT_BEAM).isPresent()) {
            return Refinement.refine(pattern, there.centredAt(here.get().position()));
        }
        Optional<Solution> stayed = Refinement.refine(pattern, there);
        if (stayed.filter(s -> s.explainedFraction() >= lead.solution.explainedFraction())
                .isPresent()) {
            return stayed;
        }
        return here.flatMap(c -> Refinement.refine(pattern, there.centredAt(c.position())))
                .filter(m -> stayed.isEmpty() || m.score() > stayed.get().score() + Verdict.LEAD)
                .or(() -> stayed);
    }

    private static SearchResult result(List<Lead> leads, MeasuredPattern pattern) {
        int count = leads.size();
        return new SearchResult(
                leads.stream().map(Lead::solution).toList(),
                count + (count == 1 ? " solution" : " solutions") + " followed from the frame before, for "
                        + pattern.spots().size() + " spots.");
    }

    private static boolean isSame(Solution a, Solution b) {
        return a.placement().crystal().equals(b.placement().crystal()) && HalfTurn.angleBetween(a, b) < SAME_ANSWER;
    }

    /** Whether the explained spots are no single row through the centre. */
    private static boolean spansNet(Solution s) {
        Hkl first = s.matches().get(0).hkl();
        return s.matches().stream()
                .map(SpotMatch::hkl)
                .anyMatch(g -> g.h() * first.k() != g.k() * first.h()
                        || g.k() * first.l() != g.l() * first.k()
                        || g.h() * first.l() != g.l() * first.h());
    }
}
