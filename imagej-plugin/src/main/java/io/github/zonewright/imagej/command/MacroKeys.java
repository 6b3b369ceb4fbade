package io.github.zonewright.imagej.command;

import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** The keys that a macro gave, so that a misspelt one is told and not passed over. */
final class MacroKeys {

    /** A key, and its value in brackets, in quotes or up to the next space. */
    private static final Pattern OPTION = Pattern.compile("([^\\s=]+)(?:=(?:\\[[^\\]]*]|'[^']*'|\\S*))?");

    private MacroKeys() {}

    /**
     * Refuses keys that a command does not have.
     *
     * @param options the text of a macro's call, such as {@code crystal=[Sigma phase] indices}
     * @param known the command's keys
     * @throws IllegalArgumentException if one is not among them
     */
    static void check(String options, List<String> known) {
        Matcher option = OPTION.matcher(options);
        while (option.find()) {
            if (!known.contains(option.group(1))) {
                throw new IllegalArgumentException(
                        "macro key \"" + option.group(1) + "\": unknown, expected one of " + String.join(", ", known));
            }
        }
    }
}
