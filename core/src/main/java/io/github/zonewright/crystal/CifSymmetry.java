package io.github.zonewright.crystal;

import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifValue;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.symmetry.SpaceGroup;
import io.github.zonewright.symmetry.SpaceGroupSetting;
import io.github.zonewright.symmetry.SpaceGroups;
import io.github.zonewright.symmetry.SymmetryOperation;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * Settles the space group of a block: its operations if it lists any, else its Hall symbol, Hermann–Mauguin symbol or
 * number, and says in a notice where these disagree.
 */
final class CifSymmetry {

    private static final String[] OPERATIONS = {
        "_space_group_symop_operation_xyz",
        "_space_group_symop.operation_xyz",
        "_symmetry_equiv_pos_as_xyz",
        "_symmetry_equiv.pos_as_xyz"
    };
    private static final String[] HALL = {
        "_space_group_name_Hall",
        "_space_group.name_Hall",
        "_symmetry_space_group_name_Hall",
        "_symmetry.space_group_name_Hall"
    };
    private static final String[] HERMANN_MAUGUIN = {
        "_space_group_name_H-M_alt", "_space_group.name_H-M_alt", "_symmetry_space_group_name_H-M",
        "_symmetry.space_group_name_H-M", "_space_group_name_H-M_full", "_space_group.name_H-M_full",
        "_space_group_name_H-M"
    };
    private static final String[] NUMBER = {
        "_space_group_IT_number", "_space_group.IT_number", "_symmetry_Int_Tables_number", "_symmetry.Int_Tables_number"
    };

    private static final String[] FORMULA = {"_chemical_formula_sum", "_chemical_formula.sum"};

    /** A cell this far off the symmetry of its group is worth a word. */
    private static final double CELL_TOLERANCE = 0.002;

    private static final double CELL_OF_SETTING_TOLERANCE = 0.01;
    private static final int MOST_OPERATIONS = 2000;

    private final CifBlock block;
    private final Lattice lattice;
    private final List<AtomSite> sites;
    private final List<String> notices;

    private CifSymmetry(CifBlock block, Lattice lattice, List<AtomSite> sites, List<String> notices) {
        this.block = block;
        this.lattice = lattice;
        this.sites = sites;
        this.notices = notices;
    }

    static SpaceGroup read(CifBlock block, Lattice lattice, List<AtomSite> sites, List<String> notices) {
        SpaceGroup group = new CifSymmetry(block, lattice, sites, notices).settle();
        if (!group.fits(lattice, CELL_TOLERANCE)) {
            notices.add("The cell (" + lattice + ") does not have the symmetry of the space group (class "
                    + group.pointGroup() + "); both were left as they are.");
        }
        return group;
    }

    private SpaceGroup settle() {
        List<CifValue> listed =
                block.values(OPERATIONS).stream().filter(CifValue::isKnown).toList();
        Optional<SpaceGroup> operations = listed.isEmpty() ? Optional.empty() : ofOperations(listed);
        if (operations.isPresent()) {
            compareWithSymbols(operations.get());
            return operations.get();
        }
        return ofHall().or(this::ofHermannMauguin).or(this::ofNumber).orElseGet(() -> {
            notices.add("The file names no space group that could be used; P 1 was taken.");
            return SpaceGroup.generatedBy(List.of());
        });
    }

    private Optional<SpaceGroup> ofOperations(List<CifValue> listed) {
        if (listed.size() > MOST_OPERATIONS) {
            throw CrystalCifException.at(
                    listed.get(0), listed.size() + " operations, expected at most " + MOST_OPERATIONS);
        }
        List<SymmetryOperation> operations = new ArrayList<>();
        for (CifValue value : listed) {
            try {
                operations.add(SymmetryOperation.parse(value.text()));
            } catch (IllegalArgumentException e) {
                throw CrystalCifException.at(value, e.getMessage());
            }
        }
        try {
            SpaceGroup group = SpaceGroup.generatedBy(operations);
            long distinct = operations.stream()
                    .map(SymmetryOperation::reduced)
                    .distinct()
                    .count();
            if (distinct != group.order()) {
                notices.add(
                        "The " + distinct + " operations listed make no group by themselves; they were completed to "
                                + group.order() + ".");
            }
            return Optional.of(group);
        } catch (IllegalArgumentException e) {
            if (text(HALL).isEmpty()
                    && text(HERMANN_MAUGUIN).isEmpty()
                    && text(NUMBER).isEmpty()) {
                throw CrystalCifException.at(listed.get(0), e.getMessage());
            }
            notices.add("The operations listed make no space group (" + e.getMessage()
                    + "); the symbol or number was used instead.");
            return Optional.empty();
        }
    }

    private Optional<String> text(String... names) {
        for (String name : names) {
            Optional<CifValue> value = block.value(name).filter(CifValue::isKnown);
            if (value.isPresent() && !value.get().text().isBlank()) {
                return value.map(v -> v.text().trim());
            }
        }
        return Optional.empty();
    }

    private Optional<SpaceGroup> ofHall() {
        return text(HALL).flatMap(hall -> {
            try {
                return Optional.of(SpaceGroup.ofHall(hall));
            } catch (IllegalArgumentException e) {
                notices.add("The Hall symbol '" + hall + "' was passed over: " + e.getMessage() + ".");
                return Optional.empty();
            }
        });
    }

    private Optional<SpaceGroup> ofHermannMauguin() {
        return text(HERMANN_MAUGUIN).flatMap(symbol -> {
            List<SpaceGroupSetting> candidates = withCode(SpaceGroups.candidates(symbol));
            if (candidates.isEmpty()) {
                notices.add("The space-group symbol '" + symbol + "' is unknown and was passed over.");
            }
            return choose(candidates, "symbol '" + symbol + "'");
        });
    }

    private Optional<SpaceGroup> ofNumber() {
        return number().flatMap(n -> choose(withCode(SpaceGroups.settings(n)), "number " + n));
    }

    private Optional<Integer> number() {
        return text(NUMBER)
                .filter(t -> t.matches("\\d{1,3}"))
                .map(Integer::valueOf)
                .filter(n -> n >= 1 && n <= 230);
    }

    /** Those candidates that agree with the code of axes and origin, if the file gives one. */
    private List<SpaceGroupSetting> withCode(List<SpaceGroupSetting> candidates) {
        Optional<String> code =
                text("_space_group.IT_coordinate_system_code", "_space_group_IT_coordinate_system_code");
        List<SpaceGroupSetting> agreeing = candidates.stream()
                .filter(s -> code.isPresent() && s.coordinateCode().equalsIgnoreCase(code.get()))
                .toList();
        return agreeing.isEmpty() ? candidates : agreeing;
    }

    /** The preferred candidate whose symmetry the cell has; of two origins, the one that the sites speak for. */
    private Optional<SpaceGroup> choose(List<SpaceGroupSetting> candidates, String source) {
        if (candidates.isEmpty()) {
            return Optional.empty();
        }
        Optional<SpaceGroupSetting> fitting =
                candidates.stream().filter(this::fitsCell).findFirst();
        Optional<SpaceGroupSetting> otherAxes = fitting.isPresent()
                ? Optional.empty()
                : SpaceGroups.settings(candidates.get(0).number()).stream()
                        .filter(this::fitsCell)
                        .findFirst();
        OriginChoice choice = OriginChoice.among(
                candidates, fitting.or(() -> otherAxes).orElse(candidates.get(0)), lattice, sites, text(FORMULA));
        notices.add("The file lists no operations; those of " + choice.setting() + " were used, from the " + source
                + (otherAxes.isPresent()
                        ? ", whose own axes the cell does not have."
                        : candidates.size() > 1 ? ", which leaves the setting open" + choice.reason() + "." : "."));
        return Optional.of(choice.setting().group());
    }

    private boolean fitsCell(SpaceGroupSetting setting) {
        return setting.group().fits(lattice, CELL_OF_SETTING_TOLERANCE);
    }

    private void compareWithSymbols(SpaceGroup used) {
        Optional<SpaceGroupSetting> setting = SpaceGroups.identify(used);
        String name = setting.map(SpaceGroupSetting::toString).orElse("a setting that is not tabulated");
        String verdict =
                "the operations listed are those of " + name + " and were used, as they say what the atoms do.";
        text(HALL).ifPresent(hall -> {
            boolean agrees;
            try {
                agrees = SpaceGroup.ofHall(hall).equals(used);
            } catch (IllegalArgumentException e) {
                agrees = false;
            }
            if (!agrees) {
                notices.add("The Hall symbol '" + hall + "' disagrees: " + verdict);
            }
        });
        text(HERMANN_MAUGUIN).ifPresent(symbol -> {
            List<SpaceGroupSetting> candidates = SpaceGroups.candidates(symbol);
            boolean agrees = candidates.stream().anyMatch(s -> s.group().equals(used));
            if (candidates.isEmpty()) {
                notices.add("The space-group symbol '" + symbol + "' is unknown: " + verdict);
            } else if (!agrees) {
                notices.add("The space-group symbol '" + symbol + "' disagrees: " + verdict);
            } else if (candidates.stream().filter(s -> !s.qualifier().isEmpty()).count() > 1) {
                notices.add("The space-group symbol '" + symbol + "' leaves the setting open: " + verdict);
            }
        });
        number().ifPresent(n -> {
            if (setting.isPresent() && setting.get().number() != n) {
                notices.add("The space-group number " + n + " disagrees: " + verdict);
            }
        });
    }
}
