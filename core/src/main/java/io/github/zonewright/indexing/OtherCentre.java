package io.github.zonewright.indexing;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.orientation.ZoneSetting;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;

/**
 * The same zone axis and rotation about another centre. Where the direct beam is hidden a net may stand about any of its
 * nodes; the places of the spots are explained alike, and intensities alone tell the centres apart, and with them the lean.
 */
final class OtherCentre {

    /** Nats within which both stay possible: those that a verdict asks for, where intensities are trusted by half. */
    private static final double STILL_POSSIBLE = Verdict.LEAD / Refinement.INTENSITY_TRUST;

    /** Centres nearer than this, in px, are one. */
    private static final double SAME = 3;

    private OtherCentre() {}

    /**
     * The better of two such solutions, which says so where the other one's centre is possible too; the uncertainty of its
     * lean covers the other lean then.
     */
    static Solution told(Solution better, Solution other) {
        PixelPoint centre = other.placement().camera().centre();
        boolean apart = centre.distanceTo(better.placement().camera().centre()) > SAME;
        boolean explains = 10 * other.matches().size() >= 9 * better.matches().size();
        if (!apart || !explains || better.score() - other.score() > STILL_POSSIBLE) {
            return better;
        }
        ZoneSetting own = better.placement().setting();
        ZoneSetting others = other.placement().setting();
        SolutionErrors e = better.errors();
        SolutionErrors wider = new SolutionErrors(
                e.rotation(),
                Math.hypot(e.leanX(), others.leanX() - own.leanX()),
                Math.hypot(e.leanY(), others.leanY() - own.leanY()),
                e.centreX(),
                e.centreY(),
                e.constant());
        List<String> remarks = new ArrayList<>(better.remarks());
        remarks.add(String.format(
                Locale.ROOT,
                "The centre may also lie at (%.1f, %.1f): the same net about that place explains the spots nearly as well, with"
                        + " a lean of %.1f degrees.",
                centre.x(),
                centre.y(),
                Math.toDegrees(others.lean())));
        return new Solution(
                better.placement(),
                better.matches(),
                better.unexplained(),
                better.rmsResidual(),
                better.score(),
                wider,
                better.halfTurn(),
                remarks,
                better.ownScore());
    }
}
