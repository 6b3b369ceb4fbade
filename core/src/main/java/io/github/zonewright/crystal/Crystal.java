package io.github.zonewright.crystal;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SiteImage;
import io.github.zonewright.symmetry.SpaceGroup;
import io.github.zonewright.symmetry.SpaceGroups;
import io.github.zonewright.symmetry.SymmetryOperation;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.stream.Stream;

/**
 * A crystal: cell, space group and the atoms of the asymmetric unit.
 *
 * @param name what people call it
 * @param lattice the cell
 * @param spaceGroup the group, in the setting of the cell
 * @param sites the sites of the asymmetric unit, at least one
 * @param notices what was doubtful in the file it came from and what was done about it, in words for people
 */
public record Crystal(String name, Lattice lattice, SpaceGroup spaceGroup, List<AtomSite> sites, List<String> notices) {

    /**
     * Two images of a site are one atom when no fractional coordinate differs by more than this. It lets coordinates of
     * three decimals (0.333 for 1/3) stand for special positions.
     */
    public static final double SAME_SITE = 0.0015;

    /** Grams per cubic centimetre in one dalton per cubic ångström (CODATA 2018). */
    private static final double DALTON_PER_CUBIC_ANGSTROM = 1.66053906660;

    private static final int MOST_SITES = 10_000;

    /**
     * Copies the lists and checks the sites.
     *
     * @throws IllegalArgumentException if there is no site or more than 10,000
     */
    public Crystal {
        sites = List.copyOf(sites);
        notices = List.copyOf(notices);
        if (sites.isEmpty() || sites.size() > MOST_SITES) {
            throw new IllegalArgumentException(
                    "crystal " + name + ": " + sites.size() + " sites, expected 1 to " + MOST_SITES);
        }
    }

    /**
     * A crystal without notices.
     *
     * @param name what people call it
     * @param lattice the cell
     * @param spaceGroup a number, Hermann–Mauguin or Hall symbol, in the setting of the cell
     * @param sites the sites of the asymmetric unit
     * @return the crystal
     * @throws IllegalArgumentException if the symbol is unknown or there is no site
     */
    public static Crystal of(String name, Lattice lattice, String spaceGroup, AtomSite... sites) {
        SpaceGroup group = SpaceGroups.find(spaceGroup)
                .orElseThrow(() -> new IllegalArgumentException("space group \"" + spaceGroup
                        + "\", expected a number, a Hermann-Mauguin symbol or a Hall symbol"))
                .group();
        return new Crystal(name, lattice, group, List.of(sites), List.of());
    }

    /**
     * Starts a crystal that is typed in.
     *
     * @param name what people call it
     * @return a builder
     * @throws IllegalArgumentException if the name is blank
     */
    public static CrystalBuilder builder(String name) {
        return new CrystalBuilder(name);
    }

    /**
     * Every atom of the cell. Images of a site on a special position, or within {@link #SAME_SITE} of one, count once; different sites at one place, as of a
     * mixed site, are all there.
     *
     * @return the atoms, site by site
     */
    public List<UnitCellAtom> unitCellAtoms() {
        List<UnitCellAtom> atoms = new ArrayList<>();
        for (AtomSite site : sites) {
            orbit(site).forEach(image -> atoms.add(new UnitCellAtom(site, image.operation(), image.position())));
        }
        return List.copyOf(atoms);
    }

    /** The images of a site, first put onto the special position that it almost lies on. */
    List<SiteImage> orbit(AtomSite site) {
        return spaceGroup.orbit(spaceGroup.snap(site.position(), SAME_SITE), SAME_SITE);
    }

    /** The operations that leave a site where it is, up to a lattice translation. */
    List<SymmetryOperation> stabiliser(AtomSite site) {
        Vector3 at = spaceGroup.snap(site.position(), SAME_SITE);
        return spaceGroup.operations().stream()
                .filter(o -> {
                    Vector3 d = o.apply(at).minus(at);
                    return Math.abs(d.x() - Math.rint(d.x())) <= SAME_SITE
                            && Math.abs(d.y() - Math.rint(d.y())) <= SAME_SITE
                            && Math.abs(d.z() - Math.rint(d.z())) <= SAME_SITE;
                })
                .toList();
    }

    /**
     * How many atoms of each element the cell holds, occupancies counted.
     *
     * @return element symbol to number, in Hill order: carbon and hydrogen first if there is carbon, then by alphabet
     */
    public Map<String, Double> cellContents() {
        return Formula.cellContents(this);
    }

    /**
     * The chemical formula, the contents of the cell divided by the number of formula units.
     *
     * @return for example {@code Al2 O3} or {@code Fe0.95 O}
     */
    public String formula() {
        return Formula.of(this);
    }

    /**
     * The density that cell and atoms give.
     *
     * @return the density in g/cm³
     */
    public double density() {
        double mass = unitCellAtoms().stream()
                .mapToDouble(a -> a.site().occupancy() * a.site().element().weight())
                .sum();
        return DALTON_PER_CUBIC_ANGSTROM * mass / lattice.volume();
    }

    /**
     * Whether a person may mean this crystal by some words.
     *
     * @param words part of a name, or a formula with its elements in any order; blank for every crystal
     * @return whether they are part of its name, or its formula
     */
    public boolean isMeantBy(String words) {
        return CrystalNames.matches(words, formula(), List.of(name));
    }

    /**
     * The same crystal under another name.
     *
     * @param other the name
     * @return the crystal
     */
    public Crystal withName(String other) {
        return new Crystal(other, lattice, spaceGroup, sites, notices);
    }

    /** The same crystal with more to be told of it. */
    Crystal withNotices(List<String> more) {
        return new Crystal(
                name,
                lattice,
                spaceGroup,
                sites,
                Stream.concat(notices.stream(), more.stream()).toList());
    }
}
