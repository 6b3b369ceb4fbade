package io.github.zonewright.cif;

import io.github.zonewright.cif.CifToken.Type;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;

/** Puts the words of a CIF together to blocks, items and loops (International Tables G, 2.2.7). */
final class CifParser {
    private final List<CifNotice> notices = new ArrayList<>();
    private final CifLexer lexer;
    /** Comments read since the last entry; they go in front of the next one. */
    private final List<CifEntry> pending = new ArrayList<>();

    private CifToken token;

    private CifParser(String text) {
        lexer = new CifLexer(text, notices);
    }

    static CifFile parse(String text) {
        return new CifParser(text).file();
    }

    private CifFile file() {
        token = lexer.next("");
        List<String> heading = new ArrayList<>();
        while (token.type() == Type.COMMENT) {
            heading.add(token.text());
            if (heading.size() == 1) {
                lexer.setVersion(CifVersion.declaredBy(heading));
            }
            token = lexer.next("");
        }
        List<CifBlock> blocks = new ArrayList<>();
        Map<String, Integer> names = new HashMap<>();
        while (token.type() != Type.END) {
            if (token.type() != Type.DATA) {
                throw fault(token, "", "a data_ heading must come first, but here is " + token.described());
            }
            Integer before = names.putIfAbsent(CifQuoting.fold(token.text()), token.line());
            if (before != null) {
                note(
                        token,
                        "a second data block of the name '" + CifQuoting.shorten(token.text())
                                + "'; the first is on line " + before);
            }
            if (token.text().isEmpty()) {
                note(token, "a data block without a name");
            }
            blocks.add(block());
        }
        return new CifFile(heading, blocks, notices);
    }

    private CifBlock block() {
        String name = token.text();
        Scope scope = new Scope();
        advance("");
        while (token.type() != Type.END && token.type() != Type.DATA) {
            if (token.type() == Type.SAVE) {
                flush(scope.entries);
                scope.entries.add(frame());
            } else {
                entry(scope);
            }
        }
        flush(scope.entries);
        return new CifBlock(name, scope.entries);
    }

    private CifBlock frame() {
        CifToken start = token;
        Scope scope = new Scope();
        advance("");
        while (token.type() != Type.SAVE_END) {
            if (token.type() == Type.SAVE || token.type() == Type.DATA || token.type() == Type.END) {
                throw fault(
                        token,
                        "",
                        "the save frame " + start.described() + ", opened on line " + start.line()
                                + ", is not closed by save_ before " + token.described());
            }
            entry(scope);
        }
        flush(scope.entries);
        advance("");
        return new CifBlock(start.text(), scope.entries);
    }

    private void entry(Scope scope) {
        switch (token.type()) {
            case TAG -> item(scope);
            case LOOP -> loop(scope);
            case VALUE ->
                throw fault(token, "", token.described() + " belongs to no item: a data name must come before it");
            default -> throw fault(token, "", "save_ closes no save frame here");
        }
    }

    private void item(Scope scope) {
        CifToken name = token;
        advance(name.text());
        if (token.type() != Type.VALUE) {
            throw fault(name, name.text(), "the item has no value; next comes " + token.described());
        }
        flush(scope.entries);
        CifItem item = new CifItem(name.text(), token.value());
        Seen before = scope.seen.putIfAbsent(CifQuoting.fold(name.text()), new Seen(name.line(), item.value()));
        if (before == null) {
            scope.entries.add(item);
        } else if (item.value().equals(before.value)) {
            note(
                    name,
                    "the item " + name.described() + " stands here again with the value of line " + before.line
                            + "; it is kept once");
        } else {
            throw twice(name, before);
        }
        advance("");
    }

    private void loop(Scope scope) {
        CifToken start = token;
        List<CifEntry> inside = new ArrayList<>();
        List<String> tags = new ArrayList<>();
        advance("");
        while (token.type() == Type.TAG) {
            Seen before = scope.seen.putIfAbsent(CifQuoting.fold(token.text()), new Seen(token.line(), null));
            if (before != null) {
                throw twice(token, before);
            }
            tags.add(token.text());
            flush(inside);
            // If the next word is a value, it is the first name's.
            advance(tags.get(0));
        }
        if (tags.isEmpty()) {
            throw fault(start, "", "loop_ must be followed by data names, but next comes " + token.described());
        }
        List<CifValue> values = new ArrayList<>();
        CifToken row = start;
        while (token.type() == Type.VALUE) {
            flush(inside);
            if (values.size() % tags.size() == 0) {
                row = token;
            }
            values.add(token.value());
            advance(tags.get(values.size() % tags.size()));
        }
        requireWholeRows(start, row, tags, values.size());
        scope.entries.addAll(inside);
        scope.entries.add(new CifLoop(tags, values));
    }

    private void requireWholeRows(CifToken start, CifToken row, List<String> tags, int values) {
        int over = values % tags.size();
        if (over != 0) {
            throw fault(
                    row,
                    tags.get(over),
                    "the loop of line " + start.line() + " has " + tags.size() + " data names ("
                            + CifQuoting.names(tags) + ") but " + values + " values: the row that begins here has only "
                            + over
                            + ", and then comes " + token.described());
        }
        if (values == 0) {
            note(start, "a loop without values: " + CifQuoting.names(tags));
        }
    }

    /** The next word that is no comment; comments passed over wait for the next entry. */
    private void advance(String context) {
        token = lexer.next(context);
        while (token.type() == Type.COMMENT) {
            pending.add(new CifComment(token.text()));
            token = lexer.next(context);
        }
    }

    private void flush(List<CifEntry> entries) {
        entries.addAll(pending);
        pending.clear();
    }

    private void note(CifToken at, String message) {
        lexer.notice(at.line(), at.column(), message);
    }

    private static CifSyntaxException twice(CifToken tag, Seen before) {
        return fault(
                tag,
                tag.text(),
                "the item stands in this block twice, first on line " + before.line + " and again on line "
                        + tag.line());
    }

    private static CifSyntaxException fault(CifToken at, String item, String reason) {
        return new CifSyntaxException(at.line(), at.column(), item, reason);
    }

    /** Where a data name was met, and its value unless it was in a loop. */
    private record Seen(int line, CifValue value) {}

    /** The entries of a block or frame, and the data names met in it. */
    private static final class Scope {
        final List<CifEntry> entries = new ArrayList<>();
        final Map<String, Seen> seen = new HashMap<>();
    }
}
