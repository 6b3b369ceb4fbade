package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;

/**
 * Looks among left spots for a crystal near some zone axis, under a camera that is held: for every zone the spots vote for
 * the rotation, the best are scored over leans.
 */
final class GrainSearch {

    /** An orientation with its score, and the log of how many were tried. */
    record Candidate(Orientation orientation, double score) {}

    private static final int LARGEST_INDEX = 4;
    private static final int CELLS = 720;
    private static final int PEAKS_PER_ZONE = 3;
    private static final int SCORED = 24;

    /** A lean draws the spots together by its cosine: what a vote allows for, as a share of the radius. */
    private static final double SHORTENED = 0.006;

    private static final double WIDE = 0.02;
    static final double WIDTH = 0.008;
    private static final double LEAN_STEP = Math.toRadians(1);
    private static final int LEAN_STEPS = 6;

    private final GrainModel model;
    private final Crystal crystal;
    private final List<Uvw> zones;

    GrainSearch(Crystal crystal, GrainModel model) {
        this.model = model;
        this.crystal = crystal;
        this.zones = ZoneCatalogue.zones(crystal, LARGEST_INDEX);
    }

    /** How many orientations can be told apart, roughly: zones, turns by a degree, leans by two. */
    double trials() {
        return zones.size() * 360.0 * 30;
    }

    /** The best orientations near a zone axis, best first. */
    List<Candidate> candidates() {
        List<Candidate> rough = new ArrayList<>();
        for (Uvw zone : zones) {
            ZoneNet.of(zone, model.strengths()).ifPresent(net -> rough.addAll(rough(net)));
        }
        rough.sort(Comparator.comparingDouble(Candidate::score).reversed());
        return rough.subList(0, Math.min(SCORED, rough.size())).stream()
                .map(c -> leaning(c.orientation, LEAN_STEP, LEAN_STEPS))
                .map(c -> leaning(c.orientation, LEAN_STEP / 3, 2))
                .sorted(Comparator.comparingDouble(Candidate::score).reversed())
                .toList();
    }

    private List<Candidate> rough(ZoneNet net) {
        double[] votes = new double[CELLS];
        LeftSpots left = model.left();
        for (int i = 0; i < left.size(); i++) {
            double r = left.place(i).norm();
            double azimuth = left.place(i).azimuth();
            double slack = 3 * left.error(i) + SHORTENED * r;
            for (ZoneNet.Node node : net.nodes()) {
                if (node.g() > r + slack) {
                    break;
                }
                if (node.allowed() && node.g() > r - slack) {
                    double turn = (azimuth - Math.atan2(node.y(), node.x())) / (2 * Math.PI);
                    double cell = (turn - Math.floor(turn)) * CELLS;
                    votes[(int) cell % CELLS] += Math.sqrt(node.strength());
                }
            }
        }
        record Peak(int cell, double votes) {}
        List<Peak> peaks = new ArrayList<>();
        for (int c = 0; c < CELLS; c++) {
            double own = smooth(votes, c);
            if (own > 0 && own >= smooth(votes, c + 1) && own > smooth(votes, c - 1)) {
                peaks.add(new Peak(c, own));
            }
        }
        peaks.sort(Comparator.comparingDouble(Peak::votes).reversed());
        Lattice lattice = crystal.lattice();
        return peaks.subList(0, Math.min(PEAKS_PER_ZONE, peaks.size())).stream()
                .map(p -> {
                    double rotation = (p.cell + 0.5) * 2 * Math.PI / CELLS;
                    Candidate best = null;
                    for (int step = -2; step <= 2; step++) {
                        Orientation o = ZoneSetting.onZone(
                                        net.zone(), net.reference(), rotation + step * Math.PI / CELLS)
                                .orientation(lattice);
                        double score = model.score(model.nodes(o.rotation(), WIDE));
                        best = best == null || score > best.score ? new Candidate(o, score) : best;
                    }
                    return best;
                })
                .toList();
    }

    private static double smooth(double[] votes, int c) {
        int n = votes.length;
        return votes[Math.floorMod(c - 1, n)] + votes[Math.floorMod(c, n)] + votes[Math.floorMod(c + 1, n)];
    }

    /** The best of the orientations that lean about one in small steps. */
    Candidate leaning(Orientation centre, double step, int steps) {
        Candidate best = null;
        for (int i = -steps; i <= steps; i++) {
            for (int j = -steps; j <= steps; j++) {
                Rotation r =
                        Rotation.ofVector(new Vector3(i * step, j * step, 0)).after(centre.rotation());
                double score = model.score(model.nodes(r, WIDTH));
                best = best == null || score > best.score ? new Candidate(new Orientation(r), score) : best;
            }
        }
        return best;
    }
}
