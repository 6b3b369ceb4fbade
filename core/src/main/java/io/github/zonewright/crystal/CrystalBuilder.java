package io.github.zonewright.crystal;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SpaceGroupSetting;
import io.github.zonewright.symmetry.SpaceGroups;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * Collects what a person types of a crystal: space group, cell and sites.
 *
 * <p>What can be typed by mistake is refused with a message for people: a group that is unknown, a cell without the
 * symmetry of the group, an atom given twice, or two on one place. As from a file, coordinates such as 0.333 are put onto
 * the special position they stand for, and a symbol that leaves the origin open is settled by the sites; both are told
 * in the notices of the crystal.
 */
public final class CrystalBuilder {

    private static final double CELL_TOLERANCE = 0.002;

    private final String name;
    private final List<AtomSite> sites = new ArrayList<>();
    private Optional<String> symbol = Optional.empty();
    private Optional<Lattice> cell = Optional.empty();
    private double[] edges = {};

    CrystalBuilder(String name) {
        if (name.isBlank()) {
            throw new IllegalArgumentException("name of the crystal: blank, expected at least one character");
        }
        this.name = name.trim();
    }

    /**
     * The space group.
     *
     * @param text a number, a Hermann–Mauguin symbol in any usual spelling, or a Hall symbol
     * @return this builder
     * @throws IllegalArgumentException if the group is unknown
     */
    public CrystalBuilder spaceGroup(String text) {
        if (SpaceGroups.find(text).isEmpty()) {
            throw new IllegalArgumentException("space group \"" + text + "\", expected a number from 1 to 230, a"
                    + " Hermann-Mauguin symbol such as F m -3 m, or a Hall symbol");
        }
        symbol = Optional.of(text);
        return this;
    }

    /**
     * The cell.
     *
     * @param lattice edges and angles
     * @return this builder
     */
    public CrystalBuilder cell(Lattice lattice) {
        cell = Optional.of(lattice);
        return this;
    }

    /**
     * The cell by the edges that the group leaves free: a for a cubic one, a and c for a tetragonal or hexagonal one,
     * a, b and c for an orthorhombic one.
     *
     * @param lengths the edges in Å
     * @return this builder
     */
    public CrystalBuilder edges(double... lengths) {
        edges = lengths.clone();
        return this;
    }

    /**
     * Adds a site.
     *
     * @param site the site
     * @return this builder
     */
    public CrystalBuilder site(AtomSite site) {
        sites.add(site);
        return this;
    }

    /**
     * Adds a full site with its atom at rest, as typed.
     *
     * @param atom a chemical symbol; a charge is passed over: {@code Fe3+}
     * @param x coordinate along a as a fraction, such as {@code 0.25} or {@code 1/4}
     * @param y coordinate along b as a fraction
     * @param z coordinate along c as a fraction
     * @return this builder
     * @throws IllegalArgumentException if there is no such element, or a coordinate is no number
     */
    public CrystalBuilder site(String atom, String x, String y, String z) {
        return site(atom, x, y, z, 1, Displacement.NONE);
    }

    /**
     * Adds a site as typed.
     *
     * @param atom a chemical symbol; a charge is passed over: {@code Fe3+}
     * @param x coordinate along a as a fraction, such as {@code 0.25} or {@code 1/4}
     * @param y coordinate along b as a fraction
     * @param z coordinate along c as a fraction
     * @param occupancy the share of these sites that hold the atom, 0 to 1
     * @param displacement the mean-square displacement
     * @return this builder
     * @throws IllegalArgumentException if there is no such element, a coordinate is no number, or the occupancy is not 0
     *     to 1
     */
    public CrystalBuilder site(String atom, String x, String y, String z, double occupancy, Displacement displacement) {
        Element element = SiteLabel.parse(atom)
                .element()
                .orElseThrow(() -> new IllegalArgumentException(
                        "element \"" + atom + "\", expected a chemical symbol from H to Cf"));
        Vector3 position = new Vector3(Fraction.parse(x), Fraction.parse(y), Fraction.parse(z));
        long before = sites.stream().filter(s -> s.element().equals(element)).count();
        return site(new AtomSite(element.symbol() + (before + 1), element, position, occupancy, displacement));
    }

    /**
     * Makes the crystal.
     *
     * @return the crystal
     * @throws IllegalArgumentException if group, cell or sites are missing, the cell does not have the symmetry of the
     *     group, an atom is given twice, or atoms that share a place fill it more than once
     */
    public Crystal build() {
        String group = symbol.orElseThrow(() -> missing("space group"));
        if (sites.isEmpty()) {
            throw missing("site");
        }
        SpaceGroupSetting preferred = SpaceGroups.find(group).orElseThrow();
        if (cell.isEmpty() && edges.length == 0) {
            throw missing("cell");
        }
        Lattice lattice = cell.orElseGet(() -> CellShape.of(preferred).cell(edges));
        List<SpaceGroupSetting> candidates = SpaceGroups.candidates(group);
        SpaceGroupSetting fitting = (candidates.isEmpty() ? List.of(preferred) : candidates)
                .stream()
                        .filter(s -> s.group().fits(lattice, CELL_TOLERANCE))
                        .findFirst()
                        .orElseThrow(() -> new IllegalArgumentException("cell of " + name + ": " + lattice
                                + ", expected " + CellShape.of(preferred).demand() + ", as " + preferred
                                + " asks for"));
        OriginChoice choice = OriginChoice.among(candidates, fitting, lattice, sites, Optional.empty());
        List<String> notices = new ArrayList<>();
        if (!choice.reason().isEmpty()) {
            notices.add("The symbol '" + group + "' leaves the origin open; " + choice.setting() + " was used"
                    + choice.reason() + ".");
        }
        List<String> merged = new ArrayList<>();
        List<AtomSite> tidy = SiteTidying.tidy(sites, choice.setting().group(), merged);
        merged.stream().filter(n -> !n.startsWith("Truncated")).findFirst().ifPresent(fault -> {
            throw new IllegalArgumentException("sites of " + name + ": " + fault
                    + " Expected each atom once, and atoms that share a place with occupancies that add up to 1");
        });
        notices.addAll(merged);
        return new Crystal(name, lattice, choice.setting().group(), tidy, notices);
    }

    private IllegalArgumentException missing(String what) {
        return new IllegalArgumentException(what + " of " + name + ": none given, expected one");
    }
}
