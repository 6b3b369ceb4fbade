package io.github.zonewright.imagej.session;

import ij.Prefs;
import io.github.zonewright.spots.MeasuredValue;
import java.util.Arrays;
import java.util.List;

/** The unit in which a person wants to read spacings. */
public enum LengthUnit {
    /** Ångström, 10⁻¹⁰ m. */
    ANGSTROM(LengthUnit.ANGSTROM_LABEL, 1),
    /** Nanometre, 10⁻⁹ m. */
    NANOMETRE(LengthUnit.NANOMETRE_LABEL, 0.1);

    /** Label of {@link #ANGSTROM}. */
    public static final String ANGSTROM_LABEL = "Å";
    /** Label of {@link #NANOMETRE}. */
    public static final String NANOMETRE_LABEL = "nm";

    private static final String KEY = "zonewright.lengths";

    private final String label;
    private final double perAngstrom;

    LengthUnit(String label, double perAngstrom) {
        this.label = label;
        this.perAngstrom = perAngstrom;
    }

    /**
     * The one used last, under the same preference as the commands' dialogs.
     *
     * @return the unit; Å at first
     */
    public static LengthUnit last() {
        return NANOMETRE_LABEL.equals(Prefs.get(KEY, ANGSTROM_LABEL)) ? NANOMETRE : ANGSTROM;
    }

    /**
     * The label as it is recorded, in ASCII.
     *
     * @return a text that {@link #ofLabel} reads
     */
    public String recorded() {
        return Choice.recorded(label);
    }

    /**
     * The unit of a label.
     *
     * @param text the label
     * @return the unit
     * @throws IllegalArgumentException if there is none
     */
    public static LengthUnit ofLabel(String text) {
        List<String> labels = Arrays.stream(values()).map(LengthUnit::label).toList();
        return values()[labels.indexOf(Choice.pick("Lengths in", text, labels))];
    }

    /** Makes it the one used last. */
    public void remember() {
        Prefs.set(KEY, label);
    }

    /**
     * What a person reads.
     *
     * @return the unit's symbol
     */
    public String label() {
        return label;
    }

    /**
     * A length in this unit.
     *
     * @param angstroms the length in Å
     * @return its number
     */
    public double of(double angstroms) {
        return angstroms * perAngstrom;
    }

    /**
     * A length in words and numbers.
     *
     * @param angstroms the length in Å and its standard uncertainty
     * @return both in this unit, as many digits as the uncertainty bears
     */
    public String text(MeasuredValue angstroms) {
        return Figures.of(angstroms.times(perAngstrom), " " + label);
    }
}
