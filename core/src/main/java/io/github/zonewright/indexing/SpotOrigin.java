package io.github.zonewright.indexing;

import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.Locale;

/** Where a spot may come from, in the frame of a solution. */
public sealed interface SpotOrigin {

    /**
     * The measured spot.
     *
     * @return the spot
     */
    MeasuredSpot spot();

    /**
     * Its place in the solution's frame.
     *
     * @return the indices, whole or not
     */
    FractionalIndices indices();

    /**
     * One sentence for a person.
     *
     * @return what the spot is, or may be
     */
    String sentence();

    /**
     * A reflection of the crystal's zero layer that it scatters by itself.
     *
     * @param spot the spot
     * @param indices its place
     * @param hkl the reflection
     */
    record Reflected(MeasuredSpot spot, FractionalIndices indices, Hkl hkl) implements SpotOrigin {

        @Override
        public String sentence() {
            return "Reflection " + hkl + ".";
        }
    }

    /**
     * A reflection of an upper layer.
     *
     * @param spot the spot
     * @param indices its place
     * @param hkl the reflection
     * @param layer hu + kv + lw
     * @param excitationError how far it is off the Ewald sphere, in 1/Å
     */
    record UpperLayer(MeasuredSpot spot, FractionalIndices indices, Hkl hkl, int layer, double excitationError)
            implements SpotOrigin {

        @Override
        public String sentence() {
            return String.format(
                    Locale.ROOT,
                    "Reflection %s of layer %d, %.3f 1/Å off the Ewald sphere.",
                    hkl,
                    layer,
                    excitationError);
        }
    }

    /**
     * A reflection that is extinct, reached by double diffraction: the sum of two that are excited.
     *
     * @param spot the spot
     * @param indices its place
     * @param hkl the extinct reflection
     * @param first the first of the two reflections that make the strongest way
     * @param second the other, diffracted from the first one's beam
     */
    record DoubleDiffraction(MeasuredSpot spot, FractionalIndices indices, Hkl hkl, Hkl first, Hkl second)
            implements SpotOrigin {

        @Override
        public String sentence() {
            return hkl + " is extinct; double diffraction reaches it, as by " + first + " and then " + second + ".";
        }
    }

    /**
     * A reflection that is extinct and that no two excited ones add up to.
     *
     * @param spot the spot
     * @param indices its place
     * @param hkl the extinct reflection
     */
    record Extinct(MeasuredSpot spot, FractionalIndices indices, Hkl hkl) implements SpotOrigin {

        @Override
        public String sentence() {
            return hkl + " is extinct, and no two reflections that are excited add up to it: order, another crystal or"
                    + " another space group.";
        }
    }

    /**
     * A simple fraction of the crystal's lattice, as a superlattice makes it.
     *
     * @param spot the spot
     * @param indices its place
     * @param multiple its indices times the denominator, whole
     * @param denominator 2, 3, 4 or 6
     * @param chance how likely a spot anywhere lies as near to such a point
     */
    record Fraction(MeasuredSpot spot, FractionalIndices indices, Hkl multiple, int denominator, double chance)
            implements SpotOrigin {

        @Override
        public String sentence() {
            return String.format(
                    Locale.ROOT,
                    "At (%s)/%d, as of a superlattice; %.1f %% of all places are as near to such a point.",
                    multiple,
                    denominator,
                    100 * chance);
        }
    }

    /**
     * A simple fraction of the lattice that is a reflection of a twin too: a twin that explains as many of the spots left over
     * as a superlattice does. Places alone do not tell which.
     *
     * @param fraction the superlattice's point
     * @param hkl the twin's reflection
     * @param law the relation of the twin to the crystal, for example {@code twin on (1 1 1), Σ3}
     * @param ofTwin how many of the spots left over the twin explains
     * @param ofSuperlattice how many of them the superlattice of this denominator explains
     */
    record Twin(Fraction fraction, Hkl hkl, String law, int ofTwin, int ofSuperlattice) implements SpotOrigin {

        @Override
        public MeasuredSpot spot() {
            return fraction.spot();
        }

        @Override
        public FractionalIndices indices() {
            return fraction.indices();
        }

        @Override
        public String sentence() {
            return "Reflection " + hkl + " of a " + law + ", which explains " + ofTwin
                    + " of the spots left over; or at ("
                    + fraction.multiple() + ")/" + fraction.denominator() + ", as of a superlattice, which explains "
                    + ofSuperlattice + ". Places alone do not tell which.";
        }
    }

    /**
     * Nothing of the crystal that is known here.
     *
     * @param spot the spot
     * @param indices its place
     */
    record Unknown(MeasuredSpot spot, FractionalIndices indices) implements SpotOrigin {

        @Override
        public String sentence() {
            return "At " + indices.text() + ", no simple fraction.";
        }
    }
}
