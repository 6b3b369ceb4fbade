package io.github.zonewright.cif;

import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * A CIF: comments at its head, and data blocks.
 *
 * <p><b>What is kept.</b> A file read and written loses no block, item, loop, save frame, value, comment or order.
 * A comment inside an item or a loop moves in front of it; one too long for a line becomes two. Not kept: white space, line ends (LF is written), the
 * choice of quotes, and where a text field was folded; an item repeated with the same value is kept once, with a notice.
 *
 * <p><b>What is tolerated</b>, each with a notice: a block without a name or with the name of another, a loop without
 * values, a bare value that the standard wants quoted. Silently: lines and names of any length, characters outside
 * ASCII, and Ctrl-Z at the very end.
 *
 * <p><b>Known limits.</b> Files up to {@value #LONGEST_FILE} bytes or characters and {@value #MOST_WORDS} words, lists nested 64 deep.
 *
 * @param heading the comments in front of the first block, each without its {@code #}; the first may declare a version
 * @param blocks the data blocks in order
 * @param notices what the reader let pass although the standard forbids it, the first 100
 */
public record CifFile(List<String> heading, List<CifBlock> blocks, List<CifNotice> notices) {
    /** The most bytes, or characters, of a file that is read. */
    public static final int LONGEST_FILE = 32 << 20;
    /** The most words of a file that is read: a value or comment counts as one, a name or heading as four. */
    public static final int MOST_WORDS = 2_000_000;

    /**
     * Copies the lists and checks the comments.
     *
     * @throws IllegalArgumentException if a comment has a line end, or a list or table stands in a file that does not
     *     declare CIF 2.0
     */
    public CifFile {
        heading = List.copyOf(heading);
        blocks = List.copyOf(blocks);
        notices = List.copyOf(notices);
        heading.forEach(CifComment::new);
        if (CifVersion.declaredBy(heading) == CifVersion.CIF_1_1) {
            blocks.forEach(CifFile::requireNoCompound);
        }
    }

    private static void requireNoCompound(CifBlock block) {
        for (CifEntry entry : block.entries()) {
            if (entry instanceof CifBlock frame) {
                requireNoCompound(frame);
            } else if (entry instanceof CifItem item) {
                requireSimple(item.value());
            } else if (entry instanceof CifLoop loop) {
                loop.values().forEach(CifFile::requireSimple);
            }
        }
    }

    private static void requireSimple(CifValue value) {
        if (value.kind() == CifValue.Kind.LIST || value.kind() == CifValue.Kind.TABLE) {
            throw new IllegalArgumentException(
                    "lists and tables need CIF 2.0, but the file is CIF 1.1: " + value.item());
        }
    }

    /**
     * A file to be written, of CIF 1.1, or of CIF 2.0 if it has characters outside ASCII, which 1.1 does not know.
     *
     * @param blocks the data blocks
     * @return the file
     * @throws IllegalArgumentException if a list or table of CIF 2.0 is among the values
     */
    public static CifFile of(CifBlock... blocks) {
        CifFile plain = of(CifVersion.CIF_1_1, blocks);
        return plain.toText().chars().allMatch(c -> c < 128) ? plain : of(CifVersion.CIF_2_0, blocks);
    }

    /**
     * A file of a version to be written.
     *
     * @param version the version
     * @param blocks the data blocks
     * @return the file
     * @throws IllegalArgumentException if a list or table is among the values of a file of CIF 1.1
     */
    public static CifFile of(CifVersion version, CifBlock... blocks) {
        return new CifFile(List.of(version.magic()), List.of(blocks), List.of());
    }

    /**
     * Reads a CIF from text.
     *
     * @param text the whole file; a byte order mark in front is passed over
     * @return the file
     * @throws CifSyntaxException if the text is no CIF
     */
    public static CifFile parse(String text) {
        if (text.length() > LONGEST_FILE) {
            throw tooLong();
        }
        String unified = CifCharacters.unifyLineEnds(text);
        int start = unified.startsWith("\uFEFF") ? 1 : 0;
        int end = unified.endsWith("\u001A") ? unified.length() - 1 : unified.length();
        return CifParser.parse(unified.substring(start, Math.max(start, end)));
    }

    /**
     * Reads a CIF from a file.
     *
     * @param path the file
     * @return the file
     * @throws IOException if the file cannot be read
     * @throws CifSyntaxException if it is no CIF
     */
    public static CifFile read(Path path) throws IOException {
        try (InputStream in = Files.newInputStream(path)) {
            return read(in);
        }
    }

    /**
     * Reads a CIF from bytes: UTF-8 or UTF-16 if they begin with a byte order mark, else UTF-8, or ISO 8859-1 where
     * they are not UTF-8.
     *
     * @param in the bytes, read to the end and left open
     * @return the file
     * @throws IOException if the bytes cannot be read
     * @throws CifSyntaxException if they are no CIF
     */
    public static CifFile read(InputStream in) throws IOException {
        byte[] bytes = in.readNBytes(LONGEST_FILE + 1);
        if (bytes.length > LONGEST_FILE) {
            throw tooLong();
        }
        return parse(CifCharacters.decode(bytes));
    }

    private static CifSyntaxException tooLong() {
        return new CifSyntaxException(1, 1, "", "the file is longer than " + LONGEST_FILE + ", the most that is read");
    }

    /**
     * The version that the heading declares.
     *
     * @return the version; 1.1 where none is declared
     */
    public CifVersion version() {
        return CifVersion.declaredBy(heading);
    }

    /**
     * A block by name.
     *
     * @param name the name without {@code data_}, in any case
     * @return the first block of this name, or empty
     */
    public Optional<CifBlock> block(String name) {
        return blocks.stream()
                .filter(block -> CifQuoting.fold(block.name()).equals(CifQuoting.fold(name)))
                .findFirst();
    }

    /**
     * The same file with other comments at its head, below the declaration of the version.
     *
     * @param comment the comment without {@code #}, of any number of lines
     * @return the file
     * @throws IllegalArgumentException if the text cannot be written
     */
    public CifFile withHeading(String comment) {
        List<String> lines = new ArrayList<>(List.of(version().magic()));
        CifCharacters.unifyLineEnds(comment).lines().forEach(line -> lines.add(" " + line));
        return new CifFile(lines, blocks, notices);
    }

    /**
     * The file as text, to be stored as UTF-8: lines of at most 2048 characters (verbatim lists and names longer than
     * that apart), LF at their ends.
     *
     * @return the text
     */
    public String toText() {
        return new CifWriter(version()).write(this);
    }

    /**
     * Writes the file whole or not at all: into a new file in the same folder, which then takes the place of the old.
     *
     * @param path the file
     * @throws IOException if it cannot be written; an older file is then as it was
     */
    public void write(Path path) throws IOException {
        AtomicFile.write(path, toText().getBytes(StandardCharsets.UTF_8));
    }

    /**
     * Writes the file whole or not at all, and never in the place of another.
     *
     * @param path the file
     * @throws java.nio.file.FileAlreadyExistsException if there is a file of that name
     * @throws IOException if it cannot be written
     */
    public void create(Path path) throws IOException {
        AtomicFile.create(path, toText().getBytes(StandardCharsets.UTF_8));
    }
}
