package io.github.zonewright.crystal;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStream;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;

/**
 * The crystals at hand: common metals, semiconductors, oxides, minerals and calibration standards, each a CIF of the jar
 * whose {@code _citation_special_details} names where cell and sites come from.
 *
 * <p>Known limit: cells are those of the cited work, at its temperature and composition; a specimen's may differ by more
 * than a pattern can tell.
 */
public final class CrystalShelf {

    private static final Pattern PART = Pattern.compile("([A-Z][a-z]?)(\\d*\\.?\\d*)");

    /** The index is read once, when first asked for. */
    private static final class Index {
        static final List<ShelfEntry> ENTRIES = readIndex();
    }

    private CrystalShelf() {}

    /**
     * Everything on the shelf.
     *
     * @return the entries, by kind of material
     */
    public static List<ShelfEntry> entries() {
        return Index.ENTRIES;
    }

    /**
     * The crystal of a name or formula.
     *
     * @param nameOrFormula a name in any case, such as {@code ferrite} or {@code γ-Fe}, or a formula with its elements
     *     in any order, such as {@code Fe3C}
     * @return the first crystal that has it as name, as other name or as formula, in this order; empty if none has
     */
    public static Optional<Crystal> find(String nameOrFormula) {
        String wanted = fold(nameOrFormula);
        Map<String, String> parts = parts(nameOrFormula);
        return Stream.of(
                        entries().stream().filter(e -> fold(e.name()).equals(wanted)),
                        entries().stream().filter(e -> e.otherNames().stream().anyMatch(n -> fold(n).equals(wanted))),
                        entries().stream()
                                .filter(e ->
                                        !parts.isEmpty() && parts(e.formula()).equals(parts)))
                .flatMap(s -> s)
                .findFirst()
                .map(ShelfEntry::crystal);
    }

    /**
     * What a person may mean by some words.
     *
     * @param words part of a name, or a formula; blank for everything
     * @return the entries with these words in a name, or with this formula
     */
    public static List<ShelfEntry> search(String words) {
        String wanted = fold(words);
        Map<String, String> parts = parts(words);
        return entries().stream()
                .filter(e -> fold(e.name()).contains(wanted)
                        || e.otherNames().stream().anyMatch(n -> fold(n).contains(wanted))
                        || parts(e.formula()).equals(parts))
                .toList();
    }

    static Crystal read(String id) {
        try (InputStream in = CrystalShelf.class.getResourceAsStream("shelf/" + id + ".cif")) {
            if (in == null) {
                throw new IllegalArgumentException("crystal \"" + id + "\", expected one of the shelf");
            }
            return CrystalCif.read(in).get(0);
        } catch (IOException e) {
            throw new UncheckedIOException("crystal " + id + " in the library's own jar cannot be read", e);
        }
    }

    private static String fold(String name) {
        return name.toLowerCase(Locale.ROOT).replaceAll("[\\s_-]+", "");
    }

    /** Element to number as written; empty if the text is no formula. */
    private static Map<String, String> parts(String formula) {
        String text = formula.replace(" ", "");
        Map<String, String> parts = new TreeMap<>();
        Matcher m = PART.matcher(text);
        int end = 0;
        while (m.find() && m.start() == end) {
            parts.put(m.group(1), m.group(2));
            end = m.end();
        }
        return end == text.length() ? parts : Map.of();
    }

    private static List<ShelfEntry> readIndex() {
        try (BufferedReader lines = new BufferedReader(new InputStreamReader(
                CrystalShelf.class.getResourceAsStream("shelf/index.txt"), StandardCharsets.UTF_8))) {
            return lines.lines()
                    .filter(line -> !line.startsWith("#"))
                    .map(line -> line.split("\t", -1))
                    .map(f -> new ShelfEntry(f[0], f[1], f[2], f[3].isEmpty() ? List.of() : List.of(f[3].split(","))))
                    .toList();
        } catch (IOException e) {
            throw new UncheckedIOException("index of crystals in the library's own jar cannot be read", e);
        }
    }
}
