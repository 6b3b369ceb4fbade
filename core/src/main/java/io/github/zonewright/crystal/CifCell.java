package io.github.zonewright.crystal;

import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifDegrees;
import io.github.zonewright.cif.CifValue;
import io.github.zonewright.lattice.Lattice;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/** Reads the cell of a block. */
final class CifCell {

    private static final double VOLUME_TOLERANCE = 0.01;

    private CifCell() {}

    static Lattice read(CifBlock block, List<String> notices) {
        double a = length(block, "a");
        double b = length(block, "b");
        double c = length(block, "c");
        double alpha = angle(block, "alpha", notices);
        double beta = angle(block, "beta", notices);
        double gamma = angle(block, "gamma", notices);
        Lattice lattice;
        try {
            lattice = new Lattice(a, b, c, alpha, beta, gamma);
        } catch (IllegalArgumentException e) {
            throw value(block, culprit(e))
                    .map(v -> CrystalCifException.at(v, e.getMessage()))
                    .orElseGet(() -> CrystalCifException.missing(block, "_cell_angle_alpha", e.getMessage()));
        }
        known(block.value("_cell_volume", "_cell.volume")).ifPresent(stated -> {
            double volume = stated.asNumber().value();
            if (Math.abs(volume - lattice.volume()) > VOLUME_TOLERANCE * lattice.volume()) {
                notices.add(String.format(
                        Locale.ROOT,
                        "The file gives a cell volume of %s Å³, but edges and angles make %.2f Å³; these were used.",
                        stated.text(),
                        lattice.volume()));
            }
        });
        return lattice;
    }

    /** The item that a complaint about the cell is about; edges and angles are named in it. */
    private static String culprit(IllegalArgumentException complaint) {
        for (String name : List.of("edge a", "edge b", "edge c", "angle alpha", "angle beta", "angle gamma")) {
            if (complaint.getMessage().contains("cell " + name + ":")) {
                return name.replace("edge", "length").replace(' ', '_');
            }
        }
        return "angle_alpha";
    }

    private static Optional<CifValue> value(CifBlock block, String name) {
        return known(block.value("_cell_" + name, "_cell." + name));
    }

    private static Optional<CifValue> known(Optional<CifValue> value) {
        return value.filter(CifValue::isKnown);
    }

    private static double length(CifBlock block, String edge) {
        return value(block, "length_" + edge)
                .orElseThrow(() -> CrystalCifException.missing(
                        block, "_cell_length_" + edge, "gives no value, expected a length in Å"))
                .asNumber()
                .value();
    }

    /** In radians; the core dictionary of CIF has 90 degrees for an angle left out. */
    private static double angle(CifBlock block, String name, List<String> notices) {
        Optional<CifValue> value = value(block, "angle_" + name);
        if (value.isEmpty()) {
            notices.add("The file gives no " + name + "; 90 degrees was used, the default of the dictionary.");
        }
        return value.map(CifDegrees::radians).orElse(Math.PI / 2);
    }
}
