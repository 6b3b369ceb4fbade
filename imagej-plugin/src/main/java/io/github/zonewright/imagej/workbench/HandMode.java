package io.github.zonewright.imagej.workbench;

/** What the hand tool takes hold of. */
enum HandMode {
    /** The pattern that is laid over the image. */
    PATTERN(
            "Pattern",
            "Drag to turn the pattern, at its centre to move it, with Ctrl to stretch it, with Alt to tilt the crystal;"
                    + " with Shift finely. Click a spot to read it"),
    /** The measured spots and the centre. */
    SPOTS(
            "Spots",
            "Click adds a spot at the nearest peak, drag moves one, Alt-click removes one; drag the cross to set the centre"),
    /** A ruler. */
    RULER("Ruler", "Click a spot to read its spacing from the centre");

    private final String label;
    private final String help;

    HandMode(String label, String help) {
        this.label = label;
        this.help = help;
    }

    String label() {
        return label;
    }

    String help() {
        return help;
    }
}
