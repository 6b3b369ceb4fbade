package io.github.zonewright.imagej.session;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalBuilder;
import io.github.zonewright.crystal.Displacement;
import io.github.zonewright.crystal.StructureType;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SpaceGroupSetting;
import io.github.zonewright.symmetry.SpaceGroups;
import java.util.List;
import java.util.Map;

/** Crystals as a person types them: what is left blank follows from the group where it can. */
public final class TypedCrystal {
    private static final double RIGHT = 90;
    private static final double WIDE = 120;
    private static final List<String> NAMES = List.of("a", "b", "c", "α", "β", "γ");

    private TypedCrystal() {}

    /**
     * A site as typed.
     *
     * @param atom chemical symbol
     * @param x coordinate along a: {@code 0.25} or {@code 1/4}
     * @param y coordinate along b
     * @param z coordinate along c
     * @param occupancy blank for 1
     * @param b B in Å², blank for an atom at rest
     */
    public record Site(String atom, String x, String y, String z, String occupancy, String b) {
        /**
         * Whether nothing is typed.
         *
         * @return whether every text is blank
         */
        public boolean isBlank() {
            return (atom + x + y + z + occupancy + b).isBlank();
        }
    }

    /**
     * A crystal of a structure type.
     *
     * @param name what to call it; blank for its formula and type
     * @param type the type
     * @param parameters values of the type's free coordinates, by name
     * @param elements chemical symbols, one for each role of the type
     * @param edges the edges in Å that the type leaves free
     * @return the crystal
     * @throws IllegalArgumentException if something of it can't be
     */
    public static Crystal ofType(
            String name,
            StructureType type,
            Map<String, Double> parameters,
            List<String> elements,
            List<Double> edges) {
        StructureType filled = type;
        for (Map.Entry<String, Double> parameter : parameters.entrySet()) {
            filled = filled.with(parameter.getKey(), parameter.getValue());
        }
        double[] lengths = edges.stream().mapToDouble(Double::doubleValue).toArray();
        Crystal crystal = filled.crystal(elements, lengths);
        return name.isBlank() ? crystal : crystal.withName(name.strip());
    }

    /**
     * A crystal of cell, group and sites.
     *
     * @param name what to call it; blank for its formula and group
     * @param group number or symbol of the space group
     * @param cell a, b, c in Å and α, β, γ in degrees; blank for what follows from the group
     * @param sites the sites; blank ones are passed over
     * @return the crystal
     * @throws IllegalArgumentException if something of it can't be
     */
    public static Crystal ofCell(String name, String group, List<String> cell, List<Site> sites) {
        SpaceGroupSetting setting = group(group);
        CrystalBuilder builder = Crystal.builder(name.isBlank() ? "the crystal" : name)
                .spaceGroup(group)
                .cell(cell(setting, cell));
        int row = 0;
        for (Site site : sites) {
            row++;
            if (site.isBlank()) {
                continue;
            }
            try {
                add(builder, site);
            } catch (IllegalArgumentException e) {
                throw new IllegalArgumentException("row " + row + ": " + e.getMessage(), e);
            }
        }
        Crystal crystal = builder.build();
        return name.isBlank() ? crystal.withName(crystal.formula() + " (" + setting.bareSymbol() + ")") : crystal;
    }

    private static void add(CrystalBuilder builder, Site site) {
        double occupancy = site.occupancy().isBlank() ? 1 : number("occupancy", site.occupancy());
        Displacement displacement = Displacement.NONE;
        if (!site.b().isBlank()) {
            double b = number("B", site.b());
            if (b < 0) {
                throw new IllegalArgumentException("B: " + site.b() + " Å², expected 0 or more");
            }
            displacement = Displacement.ofB(b);
        }
        builder.site(
                site.atom().strip(),
                site.x().strip(),
                site.y().strip(),
                site.z().strip(),
                occupancy,
                displacement);
    }

    /**
     * The space group of a symbol or number.
     *
     * @param text in any usual spelling
     * @return its setting
     * @throws IllegalArgumentException if there is none
     */
    public static SpaceGroupSetting group(String text) {
        return SpaceGroups.find(text)
                .orElseThrow(() -> new IllegalArgumentException(
                        "space group: \"" + text + "\", expected a number from 1 to 230 or a symbol such as F m -3 m"));
    }

    /**
     * The cell, completed by what the group asks for.
     *
     * @param setting the group
     * @param texts a, b, c in Å and α, β, γ in degrees; blank for what follows from the group
     * @return the cell
     * @throws IllegalArgumentException if a text is no number, or is blank and does not follow, or makes no cell
     */
    public static Lattice cell(SpaceGroupSetting setting, List<String> texts) {
        double[] v = new double[6];
        for (int i = 0; i < v.length; i++) {
            v[i] = texts.get(i).isBlank() ? Double.NaN : number(NAMES.get(i), texts.get(i));
        }
        int n = setting.number();
        boolean rhombohedral = n >= 143 && n <= 194 && setting.qualifier().equals("R");
        boolean hexagonal = n >= 143 && n <= 194 && !rhombohedral;
        if (n > 74) {
            complete(v, 1, v[0]);
        }
        if (n > 194 || rhombohedral) {
            complete(v, 2, v[0]);
        }
        if (rhombohedral) {
            complete(v, 4, v[3]);
            complete(v, 5, v[3]);
        } else if (n > 2) {
            completeAngles(v, n, hexagonal);
        }
        for (int i = 0; i < v.length; i++) {
            if (Double.isNaN(v[i])) {
                throw new IllegalArgumentException(NAMES.get(i) + ": blank, expected a number; it does not follow from "
                        + setting.hermannMauguin());
            }
        }
        return Lattice.ofDegrees(v[0], v[1], v[2], v[3], v[4], v[5]);
    }

    /** Right angles, but for γ of hexagonal axes and one angle of a monoclinic cell, which must be typed. */
    private static void completeAngles(double[] v, int n, boolean hexagonal) {
        if (hexagonal) {
            complete(v, 5, WIDE);
        }
        boolean oneTyped = !Double.isNaN(v[3]) || !Double.isNaN(v[4]) || !Double.isNaN(v[5]);
        if (n > 15 || oneTyped) {
            for (int i = 3; i < 6; i++) {
                complete(v, i, RIGHT);
            }
        } else {
            complete(v, 3, RIGHT);
            complete(v, 5, RIGHT);
        }
    }

    private static void complete(double[] v, int i, double value) {
        if (Double.isNaN(v[i])) {
            v[i] = value;
        }
    }

    private static double number(String name, String text) {
        try {
            double number = Double.parseDouble(text.strip());
            if (Double.isFinite(number)) {
                return number;
            }
        } catch (NumberFormatException e) {
            throw new IllegalArgumentException(name + ": \"" + text + "\", expected a number", e);
        }
        throw new IllegalArgumentException(name + ": \"" + text + "\", expected a finite number");
    }
}
