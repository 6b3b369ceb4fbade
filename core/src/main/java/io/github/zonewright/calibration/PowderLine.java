package io.github.zonewright.calibration;

import io.github.zonewright.lattice.Hkl;
import java.util.List;

/**
 * A ring that a powder gives: reflections of one spacing, or of spacings too near each other to be told apart.
 *
 * @param families one member of each family in it, the strongest first
 * @param d spacing in Å; the mean by strength where several are joined
 * @param strength brightness along the ring for grains at random and one scattering, as m·|F|²·d³ with the multiplicity m;
 *     relative to the strongest line
 */
public record PowderLine(List<Hkl> families, double d, double strength) {

    /** Copies the list. */
    public PowderLine {
        families = List.copyOf(families);
    }

    /**
     * The radius of its ring for a camera constant of 1 px·Å.
     *
     * @param wavelength λ in Å
     * @return (1/λ)·tan 2θ with λ = 2d sin θ, in 1/Å
     * @throws IllegalArgumentException if the wavelength is not above 0, or too long for the line to reach the camera
     */
    public double reducedRadius(double wavelength) {
        double sine = wavelength / (2 * d);
        if (!(sine > 0 && sine < Math.sqrt(0.5))) {
            throw new IllegalArgumentException("spacing " + d + " Å at wavelength " + wavelength
                    + " Å: expected a scattering angle between 0 and 90°");
        }
        return Math.tan(2 * Math.asin(sine)) / wavelength;
    }
}
