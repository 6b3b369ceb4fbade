package io.github.zonewright.document;

import java.util.Locale;

/** What a record says that its measurement cannot know. */
public enum Caution {
    /** Whether the image is mirrored was told, not found. */
    HAND_ASSUMED(
            "Whether the image is mirrored left to right was told, not found. Spots of the zero layer fit either way, "
                    + "with opposite zone axes."),
    /** A second orientation explains the same spots. */
    HALF_TURN(
            "The orientation half a turn about the zone axis away explains the same spots. The two differ in what the "
                    + "crystal does on tilting.");

    private final String details;

    Caution(String details) {
        this.details = details;
    }

    /**
     * The caution in words.
     *
     * @return one or two sentences in plain ASCII
     */
    public String details() {
        return details;
    }

    /**
     * The name in a record.
     *
     * @return a word in lower case
     */
    public String code() {
        return name().toLowerCase(Locale.ROOT);
    }
}
