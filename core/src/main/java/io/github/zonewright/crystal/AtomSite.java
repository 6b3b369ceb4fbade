package io.github.zonewright.crystal;

import io.github.zonewright.geometry.Vector3;

/**
 * A site of the asymmetric unit and the atom on it. A mixed site is two sites at one place with occupancies below 1.
 *
 * @param label the name of the site in its crystal, for example {@code Fe1}
 * @param element the element
 * @param position fractional coordinates
 * @param occupancy the share of these sites that hold the atom, 0 to 1
 * @param displacement the mean-square displacement
 */
public record AtomSite(String label, Element element, Vector3 position, double occupancy, Displacement displacement) {

    /**
     * Checks position and occupancy.
     *
     * @throws IllegalArgumentException if a coordinate is not finite or beyond ±1000, or the occupancy not 0 to 1
     */
    public AtomSite {
        for (double x : new double[] {position.x(), position.y(), position.z()}) {
            if (!(Math.abs(x) <= 1000)) {
                throw new IllegalArgumentException(
                        "site " + label + ": fractional coordinate " + x + ", expected -1000 to 1000");
            }
        }
        if (!(occupancy >= 0 && occupancy <= 1)) {
            throw new IllegalArgumentException("site " + label + ": occupancy " + occupancy + ", expected 0 to 1");
        }
    }

    /**
     * A full site with its atom at rest, labelled by the element.
     *
     * @param symbol the chemical symbol
     * @param x fractional coordinate along a
     * @param y fractional coordinate along b
     * @param z fractional coordinate along c
     * @return the site
     * @throws IllegalArgumentException if there is no such element
     */
    public static AtomSite of(String symbol, double x, double y, double z) {
        return new AtomSite(symbol, Element.ofSymbol(symbol), new Vector3(x, y, z), 1, Displacement.NONE);
    }

    /** The same site under another label. */
    AtomSite withLabel(String other) {
        return new AtomSite(other, element, position, occupancy, displacement);
    }

    /**
     * The same site with another occupancy.
     *
     * @param share the occupancy, 0 to 1
     * @return the site
     * @throws IllegalArgumentException if the occupancy is not 0 to 1
     */
    public AtomSite withOccupancy(double share) {
        return new AtomSite(label, element, position, share, displacement);
    }

    /**
     * The same site with another displacement.
     *
     * @param other the displacement
     * @return the site
     */
    public AtomSite withDisplacement(Displacement other) {
        return new AtomSite(label, element, position, occupancy, other);
    }
}
