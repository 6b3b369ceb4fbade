package io.github.zonewright.cif;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;

/** Cuts the text of a CIF into its words (International Tables G, 2.2.7; Bernstein et al. 2016 for CIF 2.0). */
final class CifLexer {
    private static final int DEEPEST_NESTING = 64;
    /** A name, heading or key takes about as much memory as four values; 64 characters of a copy as much as one. */
    private static final int NAME_WEIGHT = 4;

    private static final int COPY_WEIGHT = 64;
    private static final int MOST_NOTICES = 100;

    private final String text;
    private final List<CifNotice> notices;
    private CifVersion version = CifVersion.CIF_1_1;
    private String item = "";
    private int position;
    private int line = 1;
    private int lineStart;
    private int count;

    CifLexer(String text, List<CifNotice> notices) {
        this.text = text;
        this.notices = notices;
        int bad = CifCharacters.firstForbidden(text);
        if (bad >= 0) {
            moveTo(bad);
            throw fault("the character " + CifCharacters.name(text.charAt(bad)) + " cannot stand in a CIF");
        }
    }

    void setVersion(CifVersion declared) {
        version = declared;
    }

    /** The next word; {@code context} is the item to which it belongs if it is a value. */
    CifToken next(String context) {
        item = context;
        skipBlanks();
        if (position == text.length()) {
            return token(CifToken.Type.END, "");
        }
        count(1);
        return switch (text.charAt(position)) {
            case '#' -> comment();
            case '\'', '"', ';', '[', '{' -> startsDelimited() ? valueToken() : word();
            default -> word();
        };
    }

    /** Keeps the file from filling the memory. */
    private void count(int words) {
        count += words;
        if (count > CifFile.MOST_WORDS) {
            throw fault("the file has more than " + CifFile.MOST_WORDS + " words, the most that are read");
        }
    }

    void notice(int atLine, int atColumn, String message) {
        if (notices.size() < MOST_NOTICES) {
            notices.add(new CifNotice(atLine, atColumn, message));
        }
    }

    private boolean startsDelimited() {
        char c = text.charAt(position);
        return switch (c) {
            case ';' -> position == lineStart;
            case '[', '{' -> version == CifVersion.CIF_2_0;
            default -> c == '\'' || c == '"';
        };
    }

    private CifToken token(CifToken.Type type, String content) {
        return new CifToken(type, content, null, line, position - lineStart + 1);
    }

    private CifToken comment() {
        CifToken start = token(CifToken.Type.COMMENT, "");
        int end = endOfLine();
        String content = text.substring(position + 1, end);
        position = end;
        return new CifToken(CifToken.Type.COMMENT, content, null, start.line(), start.column());
    }

    private CifToken valueToken() {
        CifValue value = delimited(0);
        requireBlankAfter(value);
        return new CifToken(CifToken.Type.VALUE, "", value, value.line(), value.column());
    }

    private CifToken word() {
        int start = position;
        int startColumn = start - lineStart + 1;
        while (position < text.length() && !CifCharacters.isBlank(text.charAt(position))) {
            position++;
        }
        String word = text.substring(start, position);
        CifToken structure = structure(word, startColumn);
        if (structure != null) {
            count(NAME_WEIGHT - 1);
            return structure;
        }
        CifValue value = bare(word, startColumn);
        return new CifToken(CifToken.Type.VALUE, "", value, line, startColumn);
    }

    /** A word that is a data name, a heading or a keyword; null if it is none. */
    private CifToken structure(String word, int startColumn) {
        if (word.charAt(0) == '_') {
            if (word.length() == 1) {
                throw fault(startColumn, "'_' alone is no data name");
            }
            return new CifToken(CifToken.Type.TAG, word, null, line, startColumn);
        }
        if (startsWith(word, "data_")) {
            return new CifToken(CifToken.Type.DATA, word.substring(5), null, line, startColumn);
        }
        if (startsWith(word, "save_")) {
            CifToken.Type type = word.length() == 5 ? CifToken.Type.SAVE_END : CifToken.Type.SAVE;
            return new CifToken(type, word.substring(5), null, line, startColumn);
        }
        if (word.equalsIgnoreCase("loop_")) {
            return new CifToken(CifToken.Type.LOOP, "", null, line, startColumn);
        }
        if (word.equalsIgnoreCase("global_") || word.equalsIgnoreCase("stop_")) {
            throw fault(
                    startColumn,
                    "the word " + word + " is reserved and has no place in a CIF; quote it if it is a value");
        }
        return null;
    }

    private static boolean startsWith(String word, String reserved) {
        return word.regionMatches(true, 0, reserved, 0, reserved.length());
    }

    /** A word without delimiters as a value; where the standard would have it quoted, it is taken as quoted. */
    private CifValue bare(String word, int column) {
        CifValue.Kind kind = CifValue.Kind.BARE;
        if (word.equals("?")) {
            kind = CifValue.Kind.UNKNOWN;
        } else if (word.equals(".")) {
            kind = CifValue.Kind.NOT_APPLICABLE;
        } else if (!CifQuoting.isBare(word, version) && !word.startsWith("$")) {
            if (version == CifVersion.CIF_2_0) {
                throw fault(column, "this is no bare value in CIF 2.0 and must be quoted: " + CifQuoting.excerpt(word));
            }
            notice(line, column, "read as if quoted: " + CifQuoting.excerpt(word));
            kind = CifValue.Kind.QUOTED;
        }
        return new CifValue(kind, word, List.of(), List.of(), item, line, column);
    }

    private CifValue delimited(int depth) {
        char c = text.charAt(position);
        return switch (c) {
            case ';' -> textField();
            case '[', '{' -> compound(depth);
            default -> quoted(c);
        };
    }

    private CifValue textField() {
        int startLine = line;
        int end = text.indexOf("\n;", position + 1);
        if (end < 0) {
            throw fault("the text field that starts here is not closed by ';' at the start of a line");
        }
        String content = text.substring(position + 1, end);
        moveTo(end + 2);
        String decoded = CifTextField.decode(content);
        return new CifValue(CifValue.Kind.TEXT_FIELD, decoded, List.of(), List.of(), item, startLine, 1);
    }

    private CifValue quoted(char quote) {
        int startLine = line;
        int startColumn = position - lineStart + 1;
        String triple = String.valueOf(quote).repeat(3);
        String delimiter =
                version == CifVersion.CIF_2_0 && text.startsWith(triple, position) ? triple : triple.substring(2);
        int start = position + delimiter.length();
        int end = delimiter.length() == 3 ? text.indexOf(triple, start) : closingQuote(quote, start);
        if (end < 0) {
            String where = delimiter.length() == 3 ? "" : " on its line";
            throw fault("the quoted string that starts here is not closed by " + delimiter + where);
        }
        String content = text.substring(start, end);
        moveTo(end + delimiter.length());
        return new CifValue(CifValue.Kind.QUOTED, content, List.of(), List.of(), item, startLine, startColumn);
    }

    /** In CIF 1.1 a quote closes only before white space; in CIF 2.0 the first one does. */
    private int closingQuote(char quote, int start) {
        for (int i = start; i < text.length() && text.charAt(i) != '\n'; i++) {
            boolean closes = text.charAt(i) == quote
                    && (version == CifVersion.CIF_2_0
                            || i + 1 == text.length()
                            || CifCharacters.isBlank(text.charAt(i + 1)));
            if (closes) {
                return i;
            }
        }
        return -1;
    }

    /** A list or a table of CIF 2.0. */
    private CifValue compound(int depth) {
        if (depth == DEEPEST_NESTING) {
            throw fault("lists and tables are nested deeper than " + DEEPEST_NESTING + ", the most that are read");
        }
        int start = position;
        int startLine = line;
        int startColumn = position - lineStart + 1;
        boolean table = text.charAt(position) == '{';
        char close = table ? '}' : ']';
        List<CifValue> elements = new ArrayList<>();
        List<String> keys = new ArrayList<>();
        Set<String> known = new HashSet<>();
        position++;
        skipToValue(startLine, startColumn);
        while (text.charAt(position) != close) {
            if (table) {
                CifValue key = key();
                if (!known.add(key.text())) {
                    String reason = "the table has the key " + CifQuoting.excerpt(key.text()) + " twice";
                    throw new CifSyntaxException(key.line(), key.column(), item, reason);
                }
                keys.add(key.text());
                skipToValue(startLine, startColumn);
            }
            elements.add(element(depth));
            skipToValue(startLine, startColumn);
        }
        position++;
        count(depth == 0 ? 0 : (position - start) / COPY_WEIGHT);
        CifValue.Kind kind = table ? CifValue.Kind.TABLE : CifValue.Kind.LIST;
        String verbatim = text.substring(start, position);
        return new CifValue(kind, verbatim, List.copyOf(keys), List.copyOf(elements), item, startLine, startColumn);
    }

    /** Passes over white space and comments within the list or table that starts at the place given. */
    private void skipToValue(int startLine, int startColumn) {
        skipBlanks();
        while (position < text.length() && text.charAt(position) == '#') {
            position = endOfLine();
            skipBlanks();
        }
        if (position == text.length()) {
            throw new CifSyntaxException(
                    startLine, startColumn, item, "the list or table that starts here is not closed");
        }
    }

    private CifValue key() {
        char c = text.charAt(position);
        if (c != '\'' && c != '"') {
            throw fault("a key of a table is a quoted string");
        }
        count(NAME_WEIGHT);
        CifValue key = quoted(c);
        if (position == text.length() || text.charAt(position) != ':') {
            throw fault("a key of a table is followed by ':'");
        }
        position++;
        return key;
    }

    private CifValue element(int depth) {
        count(1);
        if (startsDelimited()) {
            CifValue value = delimited(depth + 1);
            if (position < text.length() && !CifQuoting.isBracket(text.charAt(position))) {
                requireBlankAfter(value);
            }
            return value;
        }
        int start = position;
        while (position < text.length()
                && !CifCharacters.isBlank(text.charAt(position))
                && !CifQuoting.isBracket(text.charAt(position))) {
            position++;
        }
        if (position == start) {
            throw fault("'" + text.charAt(position) + "' closes no list or table here");
        }
        return bare(text.substring(start, position), start - lineStart + 1);
    }

    private void requireBlankAfter(CifValue value) {
        if (position < text.length() && !CifCharacters.isBlank(text.charAt(position))) {
            String what = value.kind() == CifValue.Kind.TEXT_FIELD ? "text field" : "quoted string, list or table";
            throw fault("white space must follow the " + what + " that ends here");
        }
    }

    private void skipBlanks() {
        while (position < text.length() && CifCharacters.isBlank(text.charAt(position))) {
            position++;
            if (text.charAt(position - 1) == '\n') {
                line++;
                lineStart = position;
            }
        }
    }

    private int endOfLine() {
        int end = text.indexOf('\n', position);
        return end < 0 ? text.length() : end;
    }

    /** Goes forward, counting lines. */
    private void moveTo(int target) {
        while (position < target) {
            if (text.charAt(position++) == '\n') {
                line++;
                lineStart = position;
            }
        }
    }

    private CifSyntaxException fault(String reason) {
        return fault(position - lineStart + 1, reason);
    }

    private CifSyntaxException fault(int column, String reason) {
        return new CifSyntaxException(line, column, item, reason);
    }
}
