package io.github.zonewright.indexing;

import io.github.zonewright.spots.MeasuredSpot;
import java.util.HashSet;
import java.util.List;
import java.util.Set;

/** The spots that a solution explains together with further crystals in what it leaves over. */
final class ExplainedSpots {
    private final Set<MeasuredSpot> own = new HashSet<>();
    private final Set<MeasuredSpot> ofGrains = new HashSet<>();
    private final Set<MeasuredSpot> left;

    ExplainedSpots(Solution first, List<Grain> grains) {
        first.matches().forEach(m -> own.add(m.measured()));
        grains.forEach(g -> g.solution().matches().forEach(m -> ofGrains.add(m.measured())));
        ofGrains.removeAll(own);
        left = new HashSet<>(first.unexplained());
        left.removeAll(ofGrains);
    }

    /** Share of the measured spots that is explained, 0 to 1; 0 without spots. */
    double fraction() {
        double explained = own.size() + ofGrains.size();
        return explained + left.size() > 0 ? explained / (explained + left.size()) : 0;
    }

    /** Share of the spots' intensity that is explained, 0 to 1. */
    double intensity() {
        double explained = sum(own) + sum(ofGrains);
        double all = explained + sum(left);
        return all > 0 ? explained / all : 0;
    }

    /** Whether another solution explains more spots of the further crystals alone than of the first. */
    boolean isOfGrains(Solution other) {
        long theirs = count(other, ofGrains);
        return theirs > count(other, own);
    }

    private static long count(Solution s, Set<MeasuredSpot> among) {
        return s.matches().stream().filter(m -> among.contains(m.measured())).count();
    }

    private static double sum(Set<MeasuredSpot> spots) {
        return spots.stream().mapToDouble(MeasuredSpot::intensity).sum();
    }
}
