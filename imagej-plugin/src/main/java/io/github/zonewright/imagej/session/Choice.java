package io.github.zonewright.imagej.session;

import java.util.List;
import java.util.Locale;

/** Choices as people and macros write them. */
public final class Choice {
    private Choice() {}

    /**
     * Finds a choice. Case, spaces and the signs that a macro file may lose (·, Å, µ) don't matter; a beginning that fits
     * one choice alone will do.
     *
     * @param label what is chosen, for the message
     * @param text what was written
     * @param choices what there is
     * @return one of the choices
     * @throws IllegalArgumentException if none fits, or more than one
     */
    public static String pick(String label, String text, List<String> choices) {
        String wanted = plain(text);
        List<String> same =
                choices.stream().filter(c -> plain(c).equals(wanted)).toList();
        List<String> begun = same.isEmpty() && !wanted.isEmpty()
                ? choices.stream().filter(c -> plain(c).startsWith(wanted)).toList()
                : same;
        if (begun.size() != 1) {
            throw new IllegalArgumentException(
                    label + ": \"" + text + "\", expected one of \"" + String.join("\", \"", choices) + "\"");
        }
        return begun.get(0);
    }

    /**
     * A choice as it is recorded: in ASCII, since ImageJ's recorder spoils a line that holds anything else.
     *
     * @param choice the choice
     * @return what {@link #pick} finds it by
     */
    public static String recorded(String choice) {
        return choice.replace('Å', 'A').replace('µ', 'u').replaceAll("[^ -~]", " ");
    }

    private static String plain(String text) {
        return text.toLowerCase(Locale.ROOT).replace('å', 'a').replace('µ', 'u').replaceAll("[^a-z0-9+-]", "");
    }
}
