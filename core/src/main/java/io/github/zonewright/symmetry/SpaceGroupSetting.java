package io.github.zonewright.symmetry;

/**
 * One tabulated setting of a space-group type.
 *
 * @param number the number of the type in International Tables for Crystallography A, 1 to 230
 * @param hermannMauguin the Hermann–Mauguin symbol with its qualifier, for example {@code F d -3 m:2}
 * @param hall the Hall symbol
 * @param coordinateCode the code of axes and origin as the core dictionary of CIF spells it ({@code b1}, {@code ba-c},
 *     {@code 2}, {@code h} …), or an empty text where the type has but one setting or the setting has no code
 */
public record SpaceGroupSetting(int number, String hermannMauguin, String hall, String coordinateCode) {

    /**
     * The symbol without the qualifier after the colon.
     *
     * @return for example {@code F d -3 m}
     */
    public String bareSymbol() {
        int colon = hermannMauguin.indexOf(':');
        return colon < 0 ? hermannMauguin : hermannMauguin.substring(0, colon);
    }

    /**
     * The qualifier after the colon.
     *
     * @return {@code 1}, {@code 2}, {@code H}, {@code R}, or an empty text
     */
    public String qualifier() {
        int colon = hermannMauguin.indexOf(':');
        return colon < 0 ? "" : hermannMauguin.substring(colon + 1);
    }

    /**
     * Generates the group.
     *
     * @return the group of the Hall symbol
     */
    public SpaceGroup group() {
        return SpaceGroup.ofHall(hall);
    }

    @Override
    public String toString() {
        return hermannMauguin + " (No. " + number + ", Hall " + hall + ")";
    }
}
