package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import java.util.List;

/**
 * What a shape of the envelope expects of the nodes of a net at a lean, but for the level c: the same for every scatter. It is
 * worked out no further than it is asked for.
 */
final class ExpectedLevels {

    /** How many are worked out at a time. */
    private static final int SOME = 16;

    private final int size;
    private final double[] gx;
    private final double[] gy;
    private final double[] curvature;
    private final double[] spread2;
    private final double[] lnStrength;
    private final double[] excitation;
    private final double[] levels;
    private Vector2 lean = Vector2.ZERO;
    private EnvelopeShape shape;
    private int excitations;
    private int known;

    ExpectedLevels(NodeIntensities intensities, double wavelength) {
        List<NodeIntensities.Entry> entries = intensities.entries();
        size = entries.size();
        gx = new double[size];
        gy = new double[size];
        curvature = new double[size];
        spread2 = new double[size];
        lnStrength = new double[size];
        excitation = new double[size];
        levels = new double[size];
        for (int i = 0; i < size; i++) {
            ZoneNet.Node node = entries.get(i).node();
            double g2 = node.g() * node.g();
            gx[i] = node.x();
            gy[i] = node.y();
            curvature[i] = -wavelength * g2 / 2;
            spread2[i] = EnvelopeShape.BENDING2 * g2;
            lnStrength[i] = Math.log(node.strength());
        }
    }

    /** The logarithm of the strongest reflection's strength. */
    double strongest() {
        double strongest = Double.NEGATIVE_INFINITY;
        for (double strength : lnStrength) {
            strongest = Math.max(strongest, strength);
        }
        return strongest;
    }

    /** From now on for this lean and shape. */
    ExpectedLevels at(Vector2 otherLean, EnvelopeShape otherShape) {
        if (otherLean != lean) {
            lean = otherLean;
            excitations = 0;
        }
        shape = otherShape;
        known = 0;
        return this;
    }

    /** The levels, of which the first so many are valid. */
    double[] first(int count) {
        if (known < count) {
            int end = Math.min(size, Math.max(count, known + SOME));
            double x = lean.x();
            double y = lean.y();
            for (; excitations < end; excitations++) {
                excitation[excitations] = curvature[excitations] - gx[excitations] * x - gy[excitations] * y;
            }
            shape.levels(lnStrength, excitation, spread2, levels, known, end);
            known = end;
        }
        return levels;
    }
}
