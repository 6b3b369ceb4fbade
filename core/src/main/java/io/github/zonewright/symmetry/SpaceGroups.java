package io.github.zonewright.symmetry;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * The tabulated settings of the 230 space-group types, found by number, Hermann–Mauguin symbol or Hall symbol.
 *
 * <p>Where a number or symbol leaves the setting open, the one preferred here is unique axis b, cell choice 1, for a
 * monoclinic type, the origin at a centre of symmetry (choice 2), and hexagonal axes for a rhombohedral type.
 * {@link #candidates(String)} gives the others too.
 */
public final class SpaceGroups {

    /** The table is read once, when first asked for. */
    private static final class Table {
        static final List<SpaceGroupSetting> SETTINGS = SettingsTable.read();
        static final SymbolIndex INDEX = new SymbolIndex(SETTINGS);
    }

    private SpaceGroups() {}

    /**
     * Every tabulated setting.
     *
     * @return 559 settings; the 530 of International Tables B first
     */
    public static List<SpaceGroupSetting> settings() {
        return Table.SETTINGS;
    }

    /**
     * The settings of one type, the preferred one first.
     *
     * @param number 1 to 230
     * @return the settings
     * @throws IllegalArgumentException if there is no such number
     */
    public static List<SpaceGroupSetting> settings(int number) {
        List<SpaceGroupSetting> found = Table.INDEX.ofNumber(number);
        if (found.isEmpty()) {
            throw new IllegalArgumentException("space-group number " + number + ", expected 1 to 230");
        }
        return found;
    }

    /**
     * The preferred setting of a type.
     *
     * @param number 1 to 230
     * @return the setting
     * @throws IllegalArgumentException if there is no such number
     */
    public static SpaceGroupSetting standard(int number) {
        return settings(number).get(0);
    }

    /**
     * The settings that a Hermann–Mauguin symbol or a number can mean, the preferred one first.
     *
     * <p>Read are short, full and old symbols ({@code P 21/c}, {@code P 1 21/c 1}, {@code F d 3 m}, {@code F 4/m -3
     * 2/m}), the double glide e ({@code C m c e}), with or without spaces, underscores or parentheses round screws, and
     * qualifiers: {@code :1 :2 :H :R}, a code of axes such as {@code :b2} or {@code :cab}, S and Z for the origins, H and
     * R at the end, and {@code (origin choice 2)} or {@code {rhombohedral axes}} in words.
     *
     * @param symbol the symbol, or a number with or without a qualifier
     * @return the settings, none if the symbol is unknown
     */
    public static List<SpaceGroupSetting> candidates(String symbol) {
        return Table.INDEX.candidates(symbol);
    }

    /**
     * The setting that a number, a Hermann–Mauguin symbol or a Hall symbol means; read as the first of these that fits.
     *
     * @param symbol for example {@code 225}, {@code Fm-3m} or {@code -F 4 2 3}
     * @return the preferred setting, or empty if the symbol is unknown
     */
    public static Optional<SpaceGroupSetting> find(String symbol) {
        return candidates(symbol).stream().findFirst().or(() -> byHall(symbol));
    }

    /**
     * The setting of a Hall symbol, spelt as in the table or in any other way that generates the same group.
     *
     * @param hall the Hall symbol
     * @return the setting, or empty if the text is no Hall symbol or its group is not tabulated
     */
    public static Optional<SpaceGroupSetting> byHall(String hall) {
        String wanted = hall.replace('_', ' ').trim().replaceAll("\\s+", " ").toLowerCase(Locale.ROOT);
        Optional<SpaceGroupSetting> same = Table.SETTINGS.stream()
                .filter(s -> s.hall().toLowerCase(Locale.ROOT).equals(wanted))
                .findFirst();
        if (same.isPresent()) {
            return same;
        }
        try {
            return identify(SpaceGroup.ofHall(hall));
        } catch (IllegalArgumentException e) {
            return Optional.empty();
        }
    }

    /**
     * The tabulated setting of a group.
     *
     * @param group the group
     * @return the first setting with the same operations, or empty if none has them
     */
    public static Optional<SpaceGroupSetting> identify(SpaceGroup group) {
        char letter = group.centring();
        PointGroup pointGroup = group.pointGroup();
        return Table.SETTINGS.stream()
                .filter(s -> pointGroup.holdsNumber(s.number())
                        && s.hall().replace("-", "").charAt(0) == letter)
                .filter(s -> s.group().equals(group))
                .findFirst();
    }

    /** The settings of a type in the order of preference: centre at the origin and hexagonal axes first. */
    static List<SpaceGroupSetting> byPreference(List<SpaceGroupSetting> settings) {
        List<SpaceGroupSetting> preferred = new ArrayList<>(settings);
        preferred.sort((a, b) -> Integer.compare(rank(a), rank(b)));
        return List.copyOf(preferred);
    }

    private static int rank(SpaceGroupSetting setting) {
        return switch (setting.qualifier()) {
            case "1", "R" -> 1;
            default -> 0;
        };
    }
}
