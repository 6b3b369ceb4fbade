package io.github.zonewright.crystal;

import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifValue;
import io.github.zonewright.geometry.Vector3;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.TreeSet;

/** Reads the sites of a block as they stand, before symmetry is asked. */
final class CifSites {

    private static final int MOST_SITES = 10_000;
    private static final double B_PER_U = 8 * Math.PI * Math.PI;
    private static final String[] COMPONENTS = {"11", "22", "33", "12", "13", "23"};

    private final CifBlock block;
    private final List<String> notices;
    private final Map<String, Displacement> anisotropic;
    private final TreeSet<String> ions = new TreeSet<>();
    private final TreeSet<String> deuterium = new TreeSet<>();
    private final TreeSet<String> water = new TreeSet<>();
    private final TreeSet<String> disordered = new TreeSet<>();

    private CifSites(CifBlock block, List<String> notices) {
        this.block = block;
        this.notices = notices;
        anisotropic = anisotropic();
    }

    static List<AtomSite> read(CifBlock block, List<String> notices) {
        CifSites reader = new CifSites(block, notices);
        List<AtomSite> sites = reader.sites();
        reader.tell(reader.ions, "Scattering factors are those of neutral atoms, also for ");
        reader.tell(reader.deuterium, "Deuterium was taken for hydrogen, which scatters alike: ");
        reader.tell(
                reader.disordered,
                "Alternatives of disorder are all kept, each with its occupancy, where one place holds one of them at a time: ");
        reader.tell(reader.water, "Water was taken for its oxygen alone: ");
        return sites;
    }

    private void tell(TreeSet<String> names, String words) {
        if (!names.isEmpty()) {
            notices.add(words + String.join(", ", names) + ".");
        }
    }

    private List<CifValue> column(String name) {
        return block.values("_atom_site_" + name, "_atom_site." + name);
    }

    private static Optional<CifValue> known(List<CifValue> column, int row) {
        return row < column.size() ? Optional.of(column.get(row)).filter(CifValue::isKnown) : Optional.empty();
    }

    private List<AtomSite> sites() {
        List<CifValue> x = column("fract_x");
        List<CifValue> y = column("fract_y");
        List<CifValue> z = column("fract_z");
        int rows = x.size();
        if (rows == 0 || y.size() != rows || z.size() != rows) {
            throw CrystalCifException.missing(
                    block, "_atom_site_fract_x", "gives no sites, expected fractional coordinates x, y and z");
        }
        if (rows > MOST_SITES) {
            throw CrystalCifException.at(x.get(0), rows + " sites, expected at most " + MOST_SITES);
        }
        List<CifValue> labels = column("label");
        List<CifValue> types = column("type_symbol");
        List<AtomSite> sites = new ArrayList<>();
        for (int row = 0; row < rows; row++) {
            String label = known(labels, row)
                    .or(() -> known(types, 0))
                    .map(CifValue::text)
                    .orElse("site " + (row + 1));
            if (known(x, row).isEmpty()
                    || known(y, row).isEmpty()
                    || known(z, row).isEmpty()) {
                notices.add("Site " + label + " has no coordinates and was left out.");
                continue;
            }
            if (known(column("calc_flag"), row)
                    .filter(v -> v.text().equalsIgnoreCase("dum"))
                    .isPresent()) {
                notices.add("Site " + label + " is marked as a dummy and was left out.");
                continue;
            }
            Optional<Element> element = element(known(types, row), known(labels, row), label, x.get(row));
            if (element.isPresent()) {
                sites.add(site(label, element.get(), x.get(row), y.get(row), z.get(row), row));
            }
        }
        if (sites.isEmpty()) {
            throw CrystalCifException.at(x.get(0), "none of the " + rows + " sites can be used");
        }
        return sites;
    }

    private AtomSite site(String label, Element element, CifValue x, CifValue y, CifValue z, int row) {
        Vector3 position = new Vector3(
                x.asNumber().value(), y.asNumber().value(), z.asNumber().value());
        double occupancy = occupancy(label, row);
        if (known(column("disorder_group"), row).isPresent()
                || known(column("disorder_assembly"), row).isPresent()) {
            disordered.add(label);
        }
        Displacement displacement = displacement(label, row);
        try {
            return new AtomSite(label, element, position, occupancy, displacement);
        } catch (IllegalArgumentException e) {
            throw CrystalCifException.at(x, e.getMessage());
        }
    }

    private Optional<Element> element(Optional<CifValue> type, Optional<CifValue> label, String name, CifValue place) {
        CifValue source = type.or(() -> label)
                .orElseThrow(() -> CrystalCifException.at(place, "the site has neither label nor type symbol"));
        SiteLabel read = SiteLabel.parse(source.text());
        if (read.element().isEmpty() && type.isPresent() && label.isPresent()) {
            read = SiteLabel.parse(label.get().text());
        }
        if (read.element().isEmpty()) {
            if (source.text().toLowerCase(Locale.ROOT).startsWith("va")) {
                notices.add("Site " + name + " is a vacancy and was left out.");
                return Optional.empty();
            }
            throw source.fault("a chemical symbol from H to Cf was expected");
        }
        if (read.ion() && type.isPresent()) {
            ions.add(source.text());
        }
        if (read.deuterium()) {
            deuterium.add(name);
        }
        if (read.water()) {
            water.add(name);
        }
        return read.element();
    }

    private double occupancy(String label, int row) {
        Optional<CifValue> value = known(column("occupancy"), row);
        double share = value.map(v -> v.asNumber().value()).orElse(1.0);
        if (share < 0) {
            throw value.orElseThrow().fault("an occupancy of 0 to 1 was expected");
        }
        if (share > 1) {
            notices.add("Site " + label + " has an occupancy of " + share + "; 1 was used.");
        }
        return Math.min(share, 1);
    }

    private Displacement displacement(String label, int row) {
        Displacement tensor = anisotropic.get(label);
        if (tensor != null) {
            return tensor;
        }
        Optional<CifValue> u = known(column("U_iso_or_equiv"), row);
        if (u.isPresent()) {
            return Displacement.ofU(u.get().asNumber().value());
        }
        return known(column("B_iso_or_equiv"), row)
                .map(b -> Displacement.ofB(b.asNumber().value()))
                .orElse(Displacement.NONE);
    }

    private Map<String, Displacement> anisotropic() {
        Map<String, Displacement> found = new HashMap<>();
        List<CifValue> labels = block.values("_atom_site_aniso_label", "_atom_site_aniso.label");
        for (String kind : List.of("U", "B")) {
            for (int row = 0; row < labels.size(); row++) {
                double[] u = new double[6];
                boolean complete = true;
                for (int i = 0; i < 6; i++) {
                    String name = kind + "_" + COMPONENTS[i];
                    Optional<CifValue> value =
                            known(block.values("_atom_site_aniso_" + name, "_atom_site_aniso." + name), row);
                    complete &= value.isPresent();
                    u[i] = value.isPresent() ? value.get().asNumber().value() / (kind.equals("B") ? B_PER_U : 1) : 0;
                }
                if (complete) {
                    found.putIfAbsent(
                            labels.get(row).text(), new Displacement.Anisotropic(u[0], u[1], u[2], u[3], u[4], u[5]));
                }
            }
        }
        return found;
    }
}
