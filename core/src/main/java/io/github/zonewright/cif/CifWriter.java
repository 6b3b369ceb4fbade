package io.github.zonewright.cif;

/** Writes a CIF so that other readers take it without a complaint. */
final class CifWriter {
    private static final int WIDTH = 80;
    private static final int TAG_WIDTH = 36;

    private final CifVersion version;
    private final StringBuilder out = new StringBuilder();

    CifWriter(CifVersion version) {
        this.version = version;
    }

    String write(CifFile file) {
        file.heading().forEach(this::comment);
        for (CifBlock block : file.blocks()) {
            out.append("data_").append(block.name()).append('\n');
            block.entries().forEach(this::entry);
        }
        return out.toString();
    }

    private void entry(CifEntry entry) {
        if (entry instanceof CifItem item) {
            item(item);
        } else if (entry instanceof CifLoop loop) {
            loop(loop);
        } else if (entry instanceof CifComment comment) {
            comment(comment.text());
        } else if (entry instanceof CifBlock frame) {
            out.append("save_").append(frame.name()).append('\n');
            frame.entries().forEach(this::entry);
            out.append("save_\n");
        }
    }

    private void comment(String text) {
        int longest = CifTextField.LONGEST_LINE - 1;
        int start = 0;
        while (text.length() - start > longest) {
            int end = start + longest;
            end -= Character.isLowSurrogate(text.charAt(end)) ? 1 : 0;
            out.append('#').append(text, start, end).append('\n');
            start = end;
        }
        out.append('#').append(text, start, text.length()).append('\n');
    }

    private void item(CifItem item) {
        String value = rendered(item.value());
        String tag = item.tag();
        out.append(tag);
        if (isTextField(value)) {
            out.append('\n').append(value).append('\n');
            return;
        }
        int wide = Math.max(tag.length() + 1, TAG_WIDTH);
        if (wide + value.length() <= WIDTH) {
            out.append(" ".repeat(wide - tag.length()));
        } else {
            out.append(tag.length() + 1 + value.length() <= WIDTH ? ' ' : '\n');
        }
        out.append(value).append('\n');
    }

    private void loop(CifLoop loop) {
        out.append("loop_\n");
        loop.tags().forEach(tag -> out.append(tag).append('\n'));
        loop.rows().forEach(row -> {
            int lineStart = out.length();
            for (CifValue cell : row) {
                String value = rendered(cell);
                boolean field = isTextField(value);
                if (out.length() > lineStart) {
                    boolean fits = out.length() - lineStart + 1 + value.length() <= CifTextField.LONGEST_LINE;
                    out.append(fits && !field ? ' ' : '\n');
                    lineStart = fits && !field ? lineStart : out.length();
                }
                out.append(value);
                if (field) {
                    out.append('\n');
                    lineStart = out.length();
                }
            }
            if (out.length() > lineStart) {
                out.append('\n');
            }
        });
    }

    private static boolean isTextField(String rendered) {
        return rendered.charAt(0) == ';';
    }

    /** The value with its delimiters; only a text field begins with a semicolon. */
    private String rendered(CifValue value) {
        String text = value.text();
        boolean verbatim = switch (value.kind()) {
            case UNKNOWN, NOT_APPLICABLE, LIST, TABLE -> true;
            case BARE -> text.length() <= CifTextField.LONGEST_LINE && isBare(text);
            case QUOTED, TEXT_FIELD -> false;
        };
        if (verbatim) {
            return text;
        }
        boolean quotable = value.kind() != CifValue.Kind.TEXT_FIELD && text.length() <= CifTextField.LONGEST_LINE - 2;
        String quoted = quotable ? CifQuoting.quoted(text, version) : "";
        return quoted.isEmpty() ? CifTextField.encode(text) : quoted;
    }

    private boolean isBare(String text) {
        return CifQuoting.isBare(text, version) || text.charAt(0) == '$';
    }
}
