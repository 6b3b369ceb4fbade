package io.github.zonewright.cif;

/**
 * What stands between the semicolons of a text field: the line-folding protocol (International Tables G, 2.2.7)
 * and the text-prefix protocol (CIF 2.0), undone and done.
 *
 * <p>Both are undone in files of either version; the prefix only where a further line follows and every one bears it.
 */
final class CifTextField {
    /** The longest line of a CIF, in characters. */
    static final int LONGEST_LINE = 2048;

    private static final int FOLD_AT = 2000;
    private static final int STEP_BACK = 1000;
    private static final String PREFIX = "> ";

    private CifTextField() {}

    /** The text that a field's content stands for. */
    static String decode(String content) {
        int end = content.indexOf('\n');
        String first = stripBlanks(end < 0 ? content : content.substring(0, end));
        if (!first.endsWith("\\")) {
            return content;
        }
        if (first.equals("\\")) {
            return end < 0 ? "" : unfold(content.substring(end + 1));
        }
        boolean folded = first.endsWith("\\\\");
        String prefix = first.substring(0, first.length() - (folded ? 2 : 1));
        if (prefix.isEmpty() || prefix.indexOf('\\') >= 0 || end < 0) {
            return content;
        }
        StringBuilder body = new StringBuilder(content.length());
        for (String line : content.substring(end + 1).split("\n", -1)) {
            if (!line.startsWith(prefix)) {
                return content;
            }
            body.append(line, prefix.length(), line.length()).append('\n');
        }
        body.setLength(body.length() - 1);
        return folded ? unfold(body.toString()) : body.toString();
    }

    private static String unfold(String body) {
        StringBuilder text = new StringBuilder(body.length());
        int start = 0;
        while (start <= body.length()) {
            int end = body.indexOf('\n', start);
            boolean last = end < 0;
            String line = body.substring(start, last ? body.length() : end);
            String stripped = stripBlanks(line);
            if (stripped.endsWith("\\")) {
                text.append(stripped, 0, stripped.length() - 1);
            } else {
                text.append(line).append(last ? "" : "\n");
            }
            start = last ? body.length() + 1 : end + 1;
        }
        return text.toString();
    }

    /** The field, from its opening to its closing semicolon, that {@link #decode} reads as the text. */
    static String encode(String text) {
        String[] lines = text.split("\n", -1);
        boolean fold = false;
        for (String line : lines) {
            fold |= line.length() > LONGEST_LINE - 8;
        }
        boolean prefixed =
                text.contains("\n;") || fold && (text.startsWith(";") || text.contains(";".repeat(STEP_BACK)));
        fold |= !prefixed && stripBlanks(lines[0]).endsWith("\\");
        prefixed |= fold && text.startsWith(";");
        String prefix = prefixed ? PREFIX : "";
        StringBuilder field = new StringBuilder(text.length() + 16).append(';');
        if (prefixed || fold) {
            field.append(prefix).append(prefixed && fold ? "\\\\" : "\\").append('\n');
        }
        for (int i = 0; i < lines.length; i++) {
            field.append(prefix);
            if (fold) {
                appendFolded(field, lines[i], prefix);
            } else {
                field.append(lines[i]);
            }
            field.append('\n');
        }
        return field.append(';').toString();
    }

    private static void appendFolded(StringBuilder field, String line, String prefix) {
        int start = 0;
        while (line.length() - start > FOLD_AT) {
            int end = start + FOLD_AT;
            while (line.charAt(end) == ';' && prefix.isEmpty() || Character.isLowSurrogate(line.charAt(end))) {
                end--;
            }
            field.append(line, start, end).append("\\\n").append(prefix);
            start = end;
        }
        field.append(line, start, line.length());
        if (stripBlanks(line).endsWith("\\")) {
            field.append("\\\n").append(prefix);
        }
    }

    /** Without the spaces and tabs at the end. */
    private static String stripBlanks(String line) {
        int end = line.length();
        while (end > 0 && CifCharacters.isBlank(line.charAt(end - 1))) {
            end--;
        }
        return line.substring(0, end);
    }
}
