package io.github.zonewright.imagej.command;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.symmetry.SpaceGroups;
import java.util.List;
import java.util.Locale;
import java.util.stream.Stream;

/**
 * What a person should see of a crystal before using it.
 *
 * @param cautions dangers of the substance itself
 * @param facts formula, density, cell and group
 * @param notices what was doubtful in the file it came from, and what was done about it
 */
public record CrystalReport(List<String> cautions, List<String> facts, List<String> notices) {
    private static final String THALLIUM =
            "CAUTION: thallium compounds are highly toxic by inhalation, by swallowing and through the skin.";

    /** Copies the lists. */
    public CrystalReport {
        cautions = List.copyOf(cautions);
        facts = List.copyOf(facts);
        notices = List.copyOf(notices);
    }

    /**
     * The report on a crystal.
     *
     * @param crystal the crystal
     * @return the report; each notice of the crystal is in it, as a caution or as a notice
     */
    public static CrystalReport of(Crystal crystal) {
        List<String> cautions = crystal.notices().stream()
                .filter(n -> n.contains("CAUTION") || n.startsWith("Of its effect on living things"))
                .map(CrystalReport::plain)
                .toList();
        if (cautions.isEmpty() && crystal.cellContents().containsKey("Tl")) {
            cautions = List.of(THALLIUM);
        }
        List<String> facts = List.of(
                String.format(Locale.ROOT, "%s;  %.4g g/cm³", crystal.formula(), crystal.density()),
                crystal.lattice().toString(),
                "Space group " + group(crystal));
        List<String> notices = crystal.notices().stream()
                .filter(n -> !n.contains("CAUTION") && !n.startsWith("Of its effect on living things"))
                .toList();
        return new CrystalReport(cautions, facts, notices);
    }

    /**
     * The report as it is printed.
     *
     * @return lines of text
     */
    public List<String> lines() {
        return Stream.of(cautions, facts, notices).flatMap(List::stream).toList();
    }

    private static String plain(String notice) {
        int at = notice.indexOf("CAUTION");
        return at < 0 ? notice : notice.substring(at);
    }

    private static String group(Crystal crystal) {
        return SpaceGroups.identify(crystal.spaceGroup())
                .map(s -> s.hermannMauguin() + ", No. " + s.number())
                .orElse("without a tabulated setting; " + crystal.spaceGroup().order() + " operations");
    }
}
