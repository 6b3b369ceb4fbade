package io.github.zonewright.crystal;

import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SpaceGroup;
import io.github.zonewright.symmetry.SpaceGroupSetting;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;

/**
 * Which of two origins the sites speak for, where a symbol names neither.
 *
 * <p>Read with the wrong origin, atoms on special positions multiply and others come too near: so the setting with which
 * the atoms make the stated formula is taken, and where both do or no formula is stated, the one that leaves clearly
 * more room between the atoms. Where neither tells, the preferred setting stays (the origin at a centre of symmetry).
 *
 * @param setting the setting to use
 * @param reason why, to follow a clause; empty if there was nothing to choose
 */
record OriginChoice(SpaceGroupSetting setting, String reason) {

    /** The shortest distance must be larger by this factor to speak for a setting. */
    private static final double CLEARLY = 1.05;

    private static final double FORMULA_TOLERANCE = 0.01;
    private static final int MOST_PAIRS = 2_000_000;

    private record Look(SpaceGroupSetting setting, boolean formula, double nearest) {
        OriginChoice because(String reason) {
            return new OriginChoice(setting, reason);
        }
    }

    static OriginChoice among(
            List<SpaceGroupSetting> candidates,
            SpaceGroupSetting preferred,
            Lattice lattice,
            List<AtomSite> sites,
            Optional<String> formula) {
        List<SpaceGroupSetting> origins = candidates.stream()
                .filter(s -> s.bareSymbol().equals(preferred.bareSymbol())
                        && s.group().fits(lattice, 0.01))
                .toList();
        long atoms = (long) sites.size() * preferred.group().order();
        if (origins.size() < 2 || !origins.contains(preferred) || atoms * sites.size() > MOST_PAIRS) {
            return new OriginChoice(preferred, "");
        }
        Map<String, Double> stated = formula.map(CrystalNames::amounts).orElse(Map.of());
        Look kept = look(preferred, lattice, sites, stated);
        for (SpaceGroupSetting origin : origins) {
            Look other = look(origin, lattice, sites, stated);
            if (other.formula != kept.formula) {
                return (other.formula ? other : kept).because("; with this one the atoms make the stated formula");
            }
            if (other.nearest > CLEARLY * kept.nearest || kept.nearest > CLEARLY * other.nearest) {
                Look far = other.nearest > kept.nearest ? other : kept;
                Look near = far == other ? kept : other;
                return far.because(String.format(
                        Locale.ROOT,
                        "; with this one the atoms are at least %.2f Å apart, with %s only %.2f Å",
                        far.nearest,
                        near.setting.hermannMauguin(),
                        near.nearest));
            }
        }
        return new OriginChoice(preferred, "; the atoms do not tell, so the usual origin was kept");
    }

    private static Look look(
            SpaceGroupSetting setting, Lattice lattice, List<AtomSite> sites, Map<String, Double> stated) {
        SpaceGroup group = setting.group();
        List<AtomSite> tidy = SiteTidying.tidy(sites, group, new ArrayList<>());
        Crystal crystal = new Crystal("", lattice, group, tidy, List.of());
        return new Look(setting, inProportion(stated, crystal.cellContents()), nearest(crystal));
    }

    private static boolean inProportion(Map<String, Double> stated, Map<String, Double> contents) {
        if (!stated.keySet().equals(contents.keySet())) {
            return false;
        }
        double all = contents.values().stream().mapToDouble(n -> n).sum()
                / stated.values().stream().mapToDouble(n -> n).sum();
        return stated.entrySet().stream()
                .allMatch(e -> Math.abs(contents.get(e.getKey()) - all * e.getValue())
                        <= FORMULA_TOLERANCE * all * e.getValue());
    }

    /** The shortest distance of two atoms in Å; alternatives of disorder do not count. */
    private static double nearest(Crystal crystal) {
        List<UnitCellAtom> atoms = crystal.unitCellAtoms();
        Matrix3 basis = crystal.lattice().basis();
        double nearest = Double.POSITIVE_INFINITY;
        for (AtomSite site : crystal.sites()) {
            for (UnitCellAtom atom : atoms) {
                if (atom.site().occupancy() + site.occupancy() > 1.001) {
                    Vector3 d = atom.position().minus(site.position());
                    for (int i = 0; i < 27; i++) {
                        double distance = basis.times(new Vector3(
                                        d.x() - Math.rint(d.x()) + i % 3 - 1,
                                        d.y() - Math.rint(d.y()) + i / 3 % 3 - 1,
                                        d.z() - Math.rint(d.z()) + i / 9 - 1))
                                .norm();
                        nearest = distance > 1e-6 ? Math.min(nearest, distance) : nearest;
                    }
                }
            }
        }
        return nearest;
    }
}
