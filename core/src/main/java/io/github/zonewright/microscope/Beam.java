package io.github.zonewright.microscope;

/**
 * The electron beam of an accelerating voltage, relativistic throughout.
 *
 * <p>With E = eU and mc² = 510.99895 keV: λ = hc/√(E(E + 2mc²)), γ = 1 + E/mc². Worked number: 200 kV gives 0.025079 Å
 * and γ = 1.39139. Constants: CODATA 2018 (h, e and c exact in the SI of 2019). Source of the formulae: International
 * Tables for Crystallography C, section 4.3.1.
 *
 * @param kilovolts accelerating voltage in kV, 0.01 to 3000
 */
public record Beam(double kilovolts) {

    /** hc in keV·Å. */
    private static final double HC = 6.62607015e-34 * 299792458.0 / 1.602176634e-19 * 1e7;

    private static final double REST_ENERGY_KEV = 510.99895;

    /**
     * Checks the voltage.
     *
     * @throws IllegalArgumentException if it is not between 0.01 and 3000 kV
     */
    public Beam {
        if (!(kilovolts >= 0.01 && kilovolts <= 3000)) {
            throw new IllegalArgumentException(
                    "accelerating voltage: " + kilovolts + " kV, expected 0.01 to 3000 kV (10 V to 3 MV)");
        }
    }

    /**
     * The beam of a voltage.
     *
     * @param kilovolts accelerating voltage in kV
     * @return the beam
     * @throws IllegalArgumentException if the voltage is not between 0.01 and 3000 kV
     */
    public static Beam ofKilovolts(double kilovolts) {
        return new Beam(kilovolts);
    }

    /**
     * The wavelength.
     *
     * @return λ in Å
     */
    public double wavelength() {
        return HC / Math.sqrt(kilovolts * (kilovolts + 2 * REST_ENERGY_KEV));
    }

    /**
     * The ratio of the relativistic mass to the rest mass.
     *
     * @return γ = 1 + E/mc²
     */
    public double gamma() {
        return 1 + kilovolts / REST_ENERGY_KEV;
    }

    /**
     * The speed of the electrons in units of the speed of light.
     *
     * @return v/c = √(E(E + 2mc²))/(E + mc²)
     */
    public double speed() {
        return Math.sqrt(kilovolts * (kilovolts + 2 * REST_ENERGY_KEV)) / (kilovolts + REST_ENERGY_KEV);
    }

    /**
     * The interaction constant σ = 2πγm₀eλ/h², written with energies: σ = 2πγ mc² λ/(hc)².
     *
     * @return σ in 1/(V·Å)
     */
    public double interactionConstant() {
        return 2 * Math.PI * gamma() * REST_ENERGY_KEV * wavelength() / (HC * HC) * 1e-3;
    }
}
