package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.Misorientation;
import io.github.zonewright.pattern.SpotPattern;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * What tells two answers apart that explain the same spots.
 *
 * @param kind why they explain the same spots
 * @param misorientation the two crystals to each other
 * @param spots the spots to look for on this image, the most telling first; empty when both expect the same everywhere
 * @param tilt the smallest tilt found after which the two expect different patterns; empty when none within reach does
 */
public record Discrimination(Kind kind, Misorientation misorientation, List<TellingSpot> spots, Optional<Tilt> tilt) {

    /** Copies the list. */
    public Discrimination {
        spots = List.copyOf(spots);
    }

    /** Why two answers explain the same spots. */
    public enum Kind {
        /** An operation of the lattice that is none of the crystal, with the same strengths: no kinematic pattern differs. */
        INDISTINGUISHABLE(
                "a turn of the lattice, with the same intensities in every zone: no pattern of single scattering"
                        + " tells them apart"),
        /** An operation of the lattice that is none of the crystal. */
        MEROHEDRAL(
                "merohedral: a turn of the lattice that is no symmetry of the crystal; every spot lies in the same place"
                        + " in every zone, and intensities alone differ"),
        /** Nearly an operation of the lattice. */
        PSEUDO_MEROHEDRAL(
                "pseudo-merohedral: a turn that the lattice nearly has as a symmetry; spots lie in nearly the same"
                        + " place in every zone"),
        /** Half a turn about the zone axis: the zero layer is the same. */
        HALF_TURN(
                "half a turn about the zone axis: the zero layer is the same by symmetry, upper layers and other zones"
                        + " are not"),
        /** An operation of the lattice and half a turn about the zone axis: the zero layer lies in the same place. */
        MEROHEDRAL_AND_HALF_TURN(
                "merohedral but for half a turn about the zone axis: the zero layer's spots lie in the same"
                        + " place and may differ in intensity, upper layers and other zones are not the same"),
        /** The nets of two zones of one crystal coincide within the errors. */
        ACCIDENTAL("accidental: the nets of two zones of the crystal coincide within the errors"),
        /** The nets of two crystals coincide within the errors. */
        TWO_CRYSTALS("accidental: the nets of two crystals coincide within the errors");

        private final String sentence;

        Kind(String sentence) {
            this.sentence = sentence;
        }

        /**
         * The kind for a person.
         *
         * @return what it is and what follows, without a full stop
         */
        public String sentence() {
            return sentence;
        }
    }

    /** Whether anything is to be seen where a spot is expected. */
    public enum Sight {
        /** A spot is there. */
        SEEN("a spot is there"),
        /** Nothing above the noise is there. */
        NOT_SEEN("nothing is seen there"),
        /** The place is behind the beam stop. */
        HIDDEN("it is behind the beam stop"),
        /** The place is not on the image. */
        OUTSIDE("it is outside the image");

        private final String sentence;

        Sight(String sentence) {
            this.sentence = sentence;
        }
    }

    /**
     * A spot that one answer expects and the other does not.
     *
     * @param hkl its reflection, as the answer that expects it counts
     * @param ofFirst whether it is the first answer that expects it
     * @param place where it is expected on the image
     * @param strength its intensity over that of the strongest spot of its pattern, 0 to 1
     * @param otherStrength what the other answer expects there, in parts of its strongest
     * @param sight what the image shows there
     */
    public record TellingSpot(
            Hkl hkl, boolean ofFirst, PixelPoint place, double strength, double otherStrength, Sight sight) {}

    /**
     * A tilt after which the two answers expect different patterns. The sense of a holder's tilts, its limits and the gap of
     * the pole piece are not known here.
     *
     * @param rotation the rotation of the specimen in the microscope frame: axis in the screen (Z is 0), right-handed,
     *     length in radians
     * @param firstZone the zone axis that comes to the beam if the first answer is right
     * @param secondZone the zone axis nearest to the beam if the second is
     * @param first the pattern that the first expects there
     * @param second the pattern that the second expects there
     * @param difference how different they are, 0 the same and 1 without anything in common
     */
    public record Tilt(
            Vector3 rotation, Uvw firstZone, Uvw secondZone, SpotPattern first, SpotPattern second, double difference) {

        /**
         * The angle of the tilt.
         *
         * @return in radians
         */
        public double angle() {
            return rotation.norm();
        }

        /**
         * The direction of the tilt axis.
         *
         * @return its azimuth in radians, counter-clockwise from X in the microscope frame; the tilt is right-handed about it
         */
        public double axisAzimuth() {
            return Math.atan2(rotation.y(), rotation.x());
        }
    }

    /**
     * What a person should know and can do.
     *
     * @return sentences: why they are alike, the spot to look for, the tilt with its cautions
     */
    public List<String> sentences() {
        List<String> said = new ArrayList<>();
        said.add("The answers stand to each other by " + misorientation.text() + "; " + kind.sentence + ".");
        spots.stream()
                .findFirst()
                .map(Discrimination::sentence)
                .ifPresentOrElse(
                        said::add, () -> said.add("On this image both expect the same spots wherever it can be seen."));
        tilt.map(Discrimination::sentence)
                .ifPresentOrElse(
                        said::add,
                        () -> said.add("No tilt to a zone axis within "
                                + Math.round(Math.toDegrees(WhatTellsApart.LARGEST_TILT))
                                + "° makes patterns that differ plainly."));
        return said;
    }

    private static String sentence(TellingSpot s) {
        return String.format(
                Locale.ROOT,
                "Look for %s of the %s answer at x %.0f, y %.0f: it expects %.0f %% of its strongest spot there, the other"
                        + " %.0f %%; %s.",
                s.hkl,
                s.ofFirst ? "first" : "second",
                s.place.x(),
                s.place.y(),
                100 * s.strength,
                100 * s.otherStrength,
                s.sight.sentence);
    }

    private static String sentence(Tilt t) {
        return String.format(
                Locale.ROOT,
                "Tilt by %.1f° about the axis at %.0f° (counter-clockwise from X of the microscope frame, right-handed): then"
                        + " [%s] is along the beam if the first is right, and about [%s] if the second is. Whether the"
                        + " holder reaches that, which of its axes turns which way, and whether the pole piece leaves room, is"
                        + " not known here: go in small steps.",
                Math.toDegrees(t.angle()),
                Math.toDegrees(t.axisAzimuth()),
                t.firstZone,
                t.secondZone);
    }
}
