package io.github.zonewright.indexing;

import java.util.ArrayList;
import java.util.List;

/** How the intensity of a reflection follows its strength |F|² and its excitation error s, but for a constant factor. */
sealed interface EnvelopeShape {

    /** Variance of s from bending of the foil over the square of |g|: about 0.23°, in rad². */
    double BENDING2 = 0.004 * 0.004;

    /** How far the logarithm of an intensity falls off at most where there are no tails. */
    double FAINTEST = 12;

    /**
     * The logarithm of the intensity.
     *
     * @param lnStrength ln |F|²
     * @param s excitation error in 1/Å
     * @param spread2 variance of s over the illuminated area, from bending, in 1/Å²
     */
    double level(double lnStrength, double s, double spread2);

    /** The same for several, from one number to another. */
    default void levels(double[] lnStrength, double[] s, double[] spread2, double[] levels, int from, int to) {
        for (int i = from; i < to; i++) {
            levels[i] = level(lnStrength[i], s[i], spread2[i]);
        }
    }

    /** The same shape with what is far from the Ewald sphere fallen off to nothing. */
    EnvelopeShape withoutTails();

    /**
     * A bell without fringes: a Lorentzian or a Gaussian of a width, where intensity follows strength by a power below 1,
     * or in proportion up to a ceiling in ln strength, as dynamical exchange has it.
     */
    record Bell(double power, double ceiling, double width, boolean gaussian) implements EnvelopeShape {

        @Override
        public double level(double lnStrength, double s, double spread2) {
            double ratio = s * s / (width * width + spread2);
            double x = lnStrength - (gaussian ? Math.min(FAINTEST / power, ratio / 2) : Math.log(1 + ratio));
            double over = x - ceiling;
            return power * (over < -20 ? x : x - Math.log(1 + Math.exp(over)));
        }

        @Override
        public void levels(double[] lnStrength, double[] s, double[] spread2, double[] levels, int from, int to) {
            double width2 = width * width;
            for (int i = from; i < to; i++) {
                levels[i] = s[i] * s[i] / (width2 + spread2[i]);
            }
            if (gaussian) {
                for (int i = from; i < to; i++) {
                    levels[i] = lnStrength[i] - Math.min(FAINTEST / power, levels[i] / 2);
                }
            } else {
                for (int i = from; i < to; i++) {
                    levels[i] = lnStrength[i] - Math.log(1 + levels[i]);
                }
            }
            for (int i = from; i < to; i++) {
                double x = levels[i];
                levels[i] = power * (x < ceiling - 20 ? x : x - Math.log(1 + Math.exp(x - ceiling)));
            }
        }

        @Override
        public EnvelopeShape withoutTails() {
            return new Bell(power, ceiling, width, true);
        }
    }

    /**
     * Two-beam fringes of a foil of a thickness, smoothed by bending: sin²(πt s′)/(ξs′)² with s′² = s² + 1/ξ², averaged over
     * a normal spread of s, to a power of 1 or below. Here 1/ξ = |F| times the factor λγ/(πΩ).
     */
    record Fringes(double thickness, double power, double inverseExtinctionPerAmplitude) implements EnvelopeShape {

        @Override
        public double level(double lnStrength, double s, double spread2) {
            double inverse2 = inverseExtinctionPerAmplitude * inverseExtinctionPerAmplitude * Math.exp(lnStrength);
            double effective2 = s * s + inverse2;
            double phase = 2 * Math.PI * thickness * Math.sqrt(effective2);
            double blur = 2 * Math.PI * Math.PI * thickness * thickness * spread2 * s * s / effective2;
            double wave = 0.5 * (1 - Math.cos(phase) * Math.exp(-blur));
            return power * Math.log(Math.max(1e-7, inverse2 / effective2 * (wave + 0.02)));
        }

        @Override
        public EnvelopeShape withoutTails() {
            return new CentralFringe(this);
        }
    }

    /** The central fringe alone, as a bell of its height and width: a spread of thickness leaves no more of the others. */
    record CentralFringe(Fringes fringes) implements EnvelopeShape {

        /** Standard deviation of a bell as wide at half its height as sin²(πts)/(πts)², times the thickness. */
        private static final double WIDTH = 0.376;

        @Override
        public double level(double lnStrength, double s, double spread2) {
            double width = WIDTH / fringes.thickness;
            double ratio = s * s / (width * width + spread2);
            return fringes.level(lnStrength, 0, 0) - Math.min(FAINTEST, fringes.power * ratio / 2);
        }

        @Override
        public EnvelopeShape withoutTails() {
            return this;
        }
    }

    /** Bells of all powers, ceilings below the strongest reflection and widths, Lorentzian and Gaussian. */
    static List<EnvelopeShape> bells(double strongest, double[] powers, double[] ceilings, double[] widths) {
        List<EnvelopeShape> all = new ArrayList<>();
        for (double width : widths) {
            for (boolean gaussian : new boolean[] {false, true}) {
                for (double power : powers) {
                    all.add(new Bell(power, 1e3, width, gaussian));
                }
                for (double ceiling : ceilings) {
                    all.add(new Bell(1, strongest - ceiling, width, gaussian));
                }
            }
        }
        return all;
    }
}
