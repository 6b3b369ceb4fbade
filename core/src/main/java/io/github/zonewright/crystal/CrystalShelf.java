package io.github.zonewright.crystal;

import io.github.zonewright.cif.CifFile;
import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * The crystals at hand: common metals, semiconductors, oxides, minerals and calibration standards, each a CIF of the jar
 * whose {@code _citation_special_details} names where cell and sites come from.
 *
 * <p>Known limit: cells are those of the cited work, at its temperature and composition; a specimen's may differ by more
 * than a pattern can tell.
 */
public final class CrystalShelf {

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
        String wanted = CrystalNames.fold(nameOrFormula);
        return Stream.of(
                        entries().stream()
                                .filter(e -> CrystalNames.fold(e.name()).equals(wanted)),
                        entries().stream()
                                .filter(e -> e.otherNames().stream()
                                        .anyMatch(n -> CrystalNames.fold(n).equals(wanted))),
                        entries().stream().filter(e -> CrystalNames.sameFormula(nameOrFormula, e.formula())))
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
        return entries().stream()
                .filter(e -> CrystalNames.matches(words, e.formula(), e.names()))
                .toList();
    }

    /**
     * The entry of an id.
     *
     * @param id the id, as {@link ShelfEntry#id()} gives it
     * @return the entry, or empty if the shelf has none of that id
     */
    public static Optional<ShelfEntry> entry(String id) {
        return entries().stream().filter(e -> e.id().equals(id)).findFirst();
    }

    static byte[] bytes(String id) {
        try (InputStream in = CrystalShelf.class.getResourceAsStream("shelf/" + id + ".cif")) {
            if (in == null) {
                throw new IllegalArgumentException("crystal \"" + id + "\", expected one of the shelf");
            }
            return in.readAllBytes();
        } catch (IOException e) {
            throw new UncheckedIOException("crystal " + id + " in the library's own jar cannot be read", e);
        }
    }

    static Crystal read(String id) {
        return CrystalCif.of(CifFile.parse(new String(bytes(id), StandardCharsets.UTF_8)))
                .get(0);
    }

    private static List<ShelfEntry> readIndex() {
        return ResourceTable.lines("shelf/index.txt").stream()
                .map(line -> line.split("\t", -1))
                .map(f -> new ShelfEntry(f[0], f[1], f[2], f[3].isEmpty() ? List.of() : List.of(f[3].split(","))))
                .toList();
    }
}
