package io.github.zonewright.crystal;

/**
 * A structure factor, a complex number in Å.
 *
 * @param re real part in Å
 * @param im imaginary part in Å
 */
public record StructureFactor(double re, double im) {

    /**
     * The modulus.
     *
     * @return |F| in Å
     */
    public double amplitude() {
        return Math.hypot(re, im);
    }

    /**
     * The phase.
     *
     * @return the phase in radians, −π to π
     */
    public double phase() {
        return Math.atan2(im, re);
    }

    /**
     * The structure factor of the opposite reflection of a crystal without absorption.
     *
     * @return the complex conjugate
     */
    public StructureFactor conjugate() {
        return new StructureFactor(re, -im);
    }

    /** This number turned by a phase: times exp(i·phase). */
    StructureFactor turned(double phase) {
        double c = Math.cos(phase);
        double s = Math.sin(phase);
        return new StructureFactor(re * c - im * s, re * s + im * c);
    }
}
