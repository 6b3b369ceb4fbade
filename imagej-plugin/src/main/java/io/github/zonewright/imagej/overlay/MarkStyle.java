package io.github.zonewright.imagej.overlay;

import java.awt.Color;

/**
 * Shape and colour of each kind of mark. Every mark is a light line over a dark, wider one, so that it shows on black,
 * grey and white; the kinds differ in shape first, so that a grey print and a colour-blind eye tell them apart too. The
 * colours are from the palette of Okabe and Ito (Color Universal Design, 2008), some of them lightened.
 */
public enum MarkStyle {
    /** A computed spot: a ring. */
    COMPUTED(new Color(0x7CC8F4)),
    /** A computed spot of an upper layer: a star of four points. */
    UPPER(new Color(0x5FD3AE)),
    /** A computed spot in the computed half: a disc. */
    DISC(new Color(0xE8F4FC)),
    /** A measured spot before any crystal is known: a square. */
    MEASURED(new Color(0xF4F4F4)),
    /** A measured spot that nothing explains, or that is off the net: a diamond. */
    UNEXPLAINED(new Color(0xF0A818)),
    /** A computed spot that ought to be seen and is not: a triangle. */
    MISSING(new Color(0xE896C0)),
    /** Where the direct beam meets the image: a cross. */
    CENTRE(new Color(0xF0E442)),
    /** The direction of the reference reflection: a line from the centre. */
    ROTATION(new Color(0xF0E442)),
    /** A computed ring of a powder: an ellipse about the centre of the rings. */
    RING(new Color(0x5FD3AE)),
    /** A forbidden spot that double diffraction may light: a square. */
    DOUBLED(new Color(0xF28C5A)),
    /** A vector of the measured net: an arrow. */
    NET(new Color(0x5FD3AE)),
    /** The area behind the stop, where nothing is measured: its outline. */
    HIDDEN(new Color(0xFF9A62)),
    /** A distance that was measured: a line with ticks across it. */
    RULER(new Color(0x7CC8F4)),
    /** A computed spot of a further crystal: two corners about it. */
    FURTHER(new Color(0x4FE0B0)),
    /** Measured minus computed, enlarged: an arrow, or a dot where it would be too short. */
    RESIDUAL(Color.WHITE),
    /** A spot to look for, which tells two answers apart: a large hexagon with the number of the answer. */
    TELLING(new Color(0xF7F0A0)),
    /** The indices of a spot. */
    LABEL(Color.WHITE),
    /** The circle on which the zero layer is excited: a circle, with a small one at its centre. */
    LAUE(new Color(0xFF9A62)),
    /** A bar of a round number of reciprocal lengths. */
    SCALE(Color.WHITE),
    /** The box that says what the shapes mean. */
    LEGEND(Color.WHITE),
    /** What was read of one spot. */
    NOTE(Color.WHITE);

    /** Width of the light line in screen px at any zoom. */
    static final double LINE = 1.6;

    /** Width of the dark line beneath. */
    static final double HALO_LINE = 3.6;

    static final Color HALO = new Color(0, 0, 0, 170);

    /** Ground of the indices. */
    static final Color PLATE = new Color(0, 0, 0, 160);

    private final Color colour;

    MarkStyle(Color colour) {
        this.colour = colour;
    }

    /**
     * The colour of the light line.
     *
     * @return the colour
     */
    public Color colour() {
        return colour;
    }

    /**
     * The value of the property that our ROIs carry.
     *
     * @return the name in lower case
     */
    public String key() {
        return name().toLowerCase(java.util.Locale.ROOT);
    }
}
