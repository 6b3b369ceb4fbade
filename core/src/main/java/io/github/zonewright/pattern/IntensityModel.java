package io.github.zonewright.pattern;

/**
 * How strongly a reflection shines at an excitation error.
 *
 * <p>Known limits: none of these models knows more than one diffracted beam. Real spots of crystals thicker than a few
 * nanometres exchange intensity with each other (dynamical diffraction), so that only strong, weak and absent can be
 * compared with an image.
 */
public sealed interface IntensityModel {

    /**
     * The intensity relative to the incident beam.
     *
     * @param excitationError s in 1/Å
     * @param extinctionDistance ξ of the reflection in Å, at the exact Bragg position; infinite for an absent one
     * @return the diffracted fraction; above 1 where the kinematic approximation has broken down
     */
    double intensity(double excitationError, double extinctionDistance);

    /**
     * Kinematic theory for a parallel-sided foil: I = (πt/ξ)² · sin²(πts)/(πts)².
     *
     * <p>Source: Hirsch, Howie, Nicholson, Pashley and Whelan, Electron Microscopy of Thin Crystals, chapter 4.
     *
     * @param thickness t in Å
     */
    record Kinematic(double thickness) implements IntensityModel {

        /**
         * Checks the thickness.
         *
         * @throws IllegalArgumentException if it is not finite and above 0
         */
        public Kinematic {
            checkThickness(thickness);
        }

        @Override
        public double intensity(double excitationError, double extinctionDistance) {
            double amplitude = Math.PI * thickness / extinctionDistance * sinc(Math.PI * thickness * excitationError);
            return amplitude * amplitude;
        }
    }

    /**
     * Two-beam dynamical theory for a parallel-sided foil without absorption: I = sin²(πt s′)/(ξs′)² with s′² = s² +
     * 1/ξ².
     *
     * <p>Source: Hirsch and others, as above, chapter 8.
     *
     * @param thickness t in Å
     */
    record TwoBeam(double thickness) implements IntensityModel {

        /**
         * Checks the thickness.
         *
         * @throws IllegalArgumentException if it is not finite and above 0
         */
        public TwoBeam {
            checkThickness(thickness);
        }

        @Override
        public double intensity(double excitationError, double extinctionDistance) {
            double effective = Math.hypot(excitationError, 1 / extinctionDistance);
            double amplitude = Math.PI * thickness / extinctionDistance * sinc(Math.PI * thickness * effective);
            return amplitude * amplitude;
        }
    }

    /**
     * The kinematic intensity averaged over bending and thickness: I = (πt/ξ)²/(1 + s²/w²), without the zeros of a
     * perfect foil. Common practice for laying a pattern over an image, since real foils are bent and wedge-shaped.
     *
     * @param thickness t in Å
     * @param halfWidth w in 1/Å, the excitation error at which the intensity has fallen to half
     */
    record Smoothed(double thickness, double halfWidth) implements IntensityModel {

        /**
         * Checks the values.
         *
         * @throws IllegalArgumentException if one of them is not finite and above 0
         */
        public Smoothed {
            checkThickness(thickness);
            if (!(halfWidth > 0) || Double.isInfinite(halfWidth)) {
                throw new IllegalArgumentException(
                        "half width of the excitation error: " + halfWidth + " 1/Å, expected finite and above 0");
            }
        }

        @Override
        public double intensity(double excitationError, double extinctionDistance) {
            double peak = Math.PI * thickness / extinctionDistance;
            double r = excitationError / halfWidth;
            return peak * peak / (1 + r * r);
        }
    }

    private static double sinc(double x) {
        return Math.abs(x) < 1e-8 ? 1 : Math.sin(x) / x;
    }

    private static void checkThickness(double thickness) {
        if (!(thickness > 0) || Double.isInfinite(thickness)) {
            throw new IllegalArgumentException("foil thickness: " + thickness + " Å, expected finite and above 0 Å");
        }
    }
}
