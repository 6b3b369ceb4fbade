package io.github.zonewright.microscope;

import java.util.Optional;

/** Units of length as images state them, and their reciprocals. */
public enum LengthUnit {
    /** 1e-12 m. */
    PICOMETRE(0.01),
    /** 1e-10 m. */
    ANGSTROM(1),
    /** 1e-9 m. */
    NANOMETRE(10),
    /** 1e-6 m. */
    MICROMETRE(1e4),
    /** 1e-3 m. */
    MILLIMETRE(1e7),
    /** 1 m. */
    METRE(1e10);

    private final double angstroms;

    LengthUnit(double angstroms) {
        this.angstroms = angstroms;
    }

    /**
     * The size of the unit.
     *
     * @return in Å
     */
    public double angstroms() {
        return angstroms;
    }

    /**
     * Reads a unit of length.
     *
     * @param text for example {@code nm}, {@code Å}, {@code A}, {@code µm}, {@code um}, {@code micron}, {@code pm}
     * @return the unit; empty if the text is none
     */
    public static Optional<LengthUnit> parse(String text) {
        return switch (plain(text)) {
            case "pm", "picometre", "picometer" -> Optional.of(PICOMETRE);
            case "Å",
                    "A",
                    "Ang",
                    "Ang.",
                    "ang",
                    "Angstrom",
                    "angstrom",
                    "Ångström",
                    "ångström",
                    "Angstroms",
                    "angstroms" -> Optional.of(ANGSTROM);
            case "nm", "nanometre", "nanometer", "nanometers", "nanometres" -> Optional.of(NANOMETRE);
            case "µm", "um", "micron", "microns", "micrometre", "micrometer" -> Optional.of(MICROMETRE);
            case "mm", "millimetre", "millimeter" -> Optional.of(MILLIMETRE);
            case "m", "metre", "meter" -> Optional.of(METRE);
            default -> Optional.empty();
        };
    }

    /**
     * Reads a unit of reciprocal length.
     *
     * @param text for example {@code 1/nm}, {@code nm⁻¹}, {@code nm^-1}, {@code nm-1}, {@code nm**-1}, {@code 1/Å}
     * @return the unit of which it is the reciprocal; empty if the text is none
     */
    public static Optional<LengthUnit> parseReciprocal(String text) {
        String plain = plain(text).replace('−', '-').replace("⁻¹", "^-1").replace("**", "^");
        if (plain.startsWith("1/")) {
            return parse(plain.substring(2));
        }
        if (plain.startsWith("/")) {
            return parse(plain.substring(1));
        }
        if (plain.endsWith("-1")) {
            String unit = plain.substring(0, plain.length() - 2);
            return parse(unit.endsWith("^") ? unit.substring(0, unit.length() - 1) : unit);
        }
        return Optional.empty();
    }

    /** Without spaces and brackets; the micro sign and the angstrom sign written one way. */
    private static String plain(String text) {
        return text.replaceAll("[\\s(){}\\[\\]]", "")
                .replace('\u212b', 'Å')
                .replace('\u03bc', 'µ')
                .replace("A\u030a", "Å");
    }
}
