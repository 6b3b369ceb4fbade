package io.github.zonewright.crystal;

import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifBlockBuilder;
import io.github.zonewright.cif.CifDegrees;
import io.github.zonewright.cif.CifLoop;
import io.github.zonewright.cif.CifValue;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SpaceGroups;
import io.github.zonewright.symmetry.SymmetryOperation;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;

/** Writes a crystal with the names of the core dictionary of CIF. */
final class CrystalCifWriter {

    private CrystalCifWriter() {}

    static CifBlock block(Crystal crystal) {
        String id = crystal.name().replaceAll("[^A-Za-z0-9]+", "_").replaceAll("^_+|_+$", "");
        CifBlockBuilder block = CifBlock.builder(id.isEmpty() ? "crystal" : id.substring(0, Math.min(60, id.length())));
        crystal.notices().forEach(block::comment);
        Lattice cell = crystal.lattice();
        block.add("_chemical_name_common", crystal.name())
                .add("_chemical_formula_sum", crystal.formula())
                .add("_cell_length_a", cell.a())
                .add("_cell_length_b", cell.b())
                .add("_cell_length_c", cell.c())
                .add("_cell_angle_alpha", CifDegrees.ofRadians(cell.alpha()))
                .add("_cell_angle_beta", CifDegrees.ofRadians(cell.beta()))
                .add("_cell_angle_gamma", CifDegrees.ofRadians(cell.gamma()))
                .add("_cell_volume", cell.volume())
                .add("_exptl_crystal_density_diffrn", crystal.density());
        SpaceGroups.identify(crystal.spaceGroup())
                .ifPresent(setting -> block.add("_space_group_IT_number", setting.number())
                        .add("_space_group_name_H-M_alt", setting.hermannMauguin())
                        .add("_space_group_name_Hall", setting.hall()));
        block.add(operations(crystal)).add(sites(crystal));
        List<List<CifValue>> tensors = tensors(crystal);
        if (!tensors.isEmpty()) {
            block.add(CifLoop.of(
                    List.of(
                            "_atom_site_aniso_label",
                            "_atom_site_aniso_U_11",
                            "_atom_site_aniso_U_22",
                            "_atom_site_aniso_U_33",
                            "_atom_site_aniso_U_12",
                            "_atom_site_aniso_U_13",
                            "_atom_site_aniso_U_23"),
                    tensors));
        }
        return block.build();
    }

    private static CifLoop operations(Crystal crystal) {
        List<List<CifValue>> rows = new ArrayList<>();
        for (SymmetryOperation operation : crystal.spaceGroup().operations()) {
            rows.add(List.of(CifValue.of(rows.size() + 1L), CifValue.of(operation.toString())));
        }
        return CifLoop.of(List.of("_space_group_symop_id", "_space_group_symop_operation_xyz"), rows);
    }

    private static CifLoop sites(Crystal crystal) {
        List<List<CifValue>> rows = new ArrayList<>();
        List<String> labels = labels(crystal);
        for (int i = 0; i < labels.size(); i++) {
            AtomSite site = crystal.sites().get(i);
            boolean iso = site.displacement() instanceof Displacement.Isotropic;
            CifValue u =
                    site.displacement() instanceof Displacement.Isotropic d ? CifValue.of(d.u()) : CifValue.UNKNOWN;
            rows.add(List.of(
                    CifValue.of(labels.get(i)),
                    CifValue.of(site.element().symbol()),
                    CifValue.of(site.position().x()),
                    CifValue.of(site.position().y()),
                    CifValue.of(site.position().z()),
                    CifValue.of(site.occupancy()),
                    CifValue.of(iso ? "Uiso" : "Uani"),
                    u));
        }
        return CifLoop.of(
                List.of(
                        "_atom_site_label",
                        "_atom_site_type_symbol",
                        "_atom_site_fract_x",
                        "_atom_site_fract_y",
                        "_atom_site_fract_z",
                        "_atom_site_occupancy",
                        "_atom_site_adp_type",
                        "_atom_site_U_iso_or_equiv"),
                rows);
    }

    private static List<List<CifValue>> tensors(Crystal crystal) {
        List<List<CifValue>> rows = new ArrayList<>();
        List<String> labels = labels(crystal);
        for (int i = 0; i < labels.size(); i++) {
            if (crystal.sites().get(i).displacement() instanceof Displacement.Anisotropic u) {
                rows.add(List.of(
                        CifValue.of(labels.get(i)),
                        CifValue.of(u.u11()),
                        CifValue.of(u.u22()),
                        CifValue.of(u.u33()),
                        CifValue.of(u.u12()),
                        CifValue.of(u.u13()),
                        CifValue.of(u.u23())));
            }
        }
        return rows;
    }

    /** The labels, made different from one another where they are not, as the key of the loop must be. */
    private static List<String> labels(Crystal crystal) {
        Set<String> taken = new HashSet<>();
        List<String> labels = new ArrayList<>();
        for (AtomSite site : crystal.sites()) {
            String label = site.label();
            for (int n = 2; !taken.add(label); n++) {
                label = site.label() + "_" + n;
            }
            labels.add(label);
        }
        return labels;
    }
}
