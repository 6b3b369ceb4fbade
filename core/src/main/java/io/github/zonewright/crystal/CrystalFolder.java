package io.github.zonewright.crystal;

import io.github.zonewright.cif.AtomicFile;
import io.github.zonewright.cif.CifFile;
import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.FileAlreadyExistsException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * The crystals that a user keeps: a folder of CIFs, the user's own and those put there by hand.
 *
 * <p>Nothing is remembered between calls: what is in the folder is what there is. A file is written whole or not at all,
 * and never in the place of another. Folders within, and files whose name begins with a dot or does not end in
 * {@code .cif}, are passed over.
 *
 * <p>Known limit: every listing reads every file, about 1 ms for a small one.
 */
public final class CrystalFolder {

    private static final String ENDING = ".cif";

    private final Path path;

    private CrystalFolder(Path path) {
        this.path = path.toAbsolutePath().normalize();
    }

    /**
     * What a folder holds.
     *
     * @param crystals the crystals, by the names of their files
     * @param unreadable what could not be read, and why
     */
    public record Listing(List<KeptCrystal> crystals, List<UnreadableFile> unreadable) {
        /** Copies the lists. */
        public Listing {
            crystals = List.copyOf(crystals);
            unreadable = List.copyOf(unreadable);
        }
    }

    /**
     * The crystals of a folder.
     *
     * @param path the folder; it is made when the first crystal is added
     * @return the folder
     */
    public static CrystalFolder at(Path path) {
        return new CrystalFolder(path);
    }

    /**
     * Where it is.
     *
     * @return the folder's absolute path
     */
    public Path path() {
        return path;
    }

    /**
     * Reads the folder.
     *
     * @return its crystals, and the files that could not be read; nothing of either if there is no such folder
     * @throws IOException if the folder itself cannot be read
     */
    public Listing list() throws IOException {
        List<KeptCrystal> crystals = new ArrayList<>();
        List<UnreadableFile> unreadable = new ArrayList<>();
        for (Path file : files(path)) {
            read(file, crystals, unreadable);
        }
        return new Listing(crystals, unreadable);
    }

    /** The CIFs of a folder by name; none if there is no such folder. */
    static List<Path> files(Path folder) throws IOException {
        if (Files.notExists(folder)) {
            return List.of();
        }
        try (Stream<Path> entries = Files.list(folder)) {
            return entries.filter(Files::isRegularFile)
                    .filter(f -> name(f).toLowerCase(Locale.ROOT).endsWith(ENDING) && !name(f).startsWith("."))
                    .sorted()
                    .toList();
        }
    }

    private static String name(Path file) {
        return file.getFileName().toString();
    }

    private static void read(Path file, List<KeptCrystal> crystals, List<UnreadableFile> unreadable) {
        try {
            byte[] bytes = Files.readAllBytes(file);
            String hash = FileHash.sha256(bytes);
            List<CifStructure> structures = CrystalCif.structures(CifFile.read(new ByteArrayInputStream(bytes)));
            if (structures.isEmpty()) {
                unreadable.add(new UnreadableFile(file, "no block has a cell or sites, expected a crystal"));
            }
            String stem = name(file).substring(0, name(file).length() - ENDING.length());
            for (int i = 0; i < structures.size(); i++) {
                if (structures.get(i) instanceof CifStructure.Usable usable) {
                    crystals.add(new KeptCrystal(i == 0 ? stem : stem + "#" + (i + 1), file, hash, usable.crystal()));
                } else if (structures.get(i) instanceof CifStructure.Refused refused) {
                    unreadable.add(new UnreadableFile(file, refused.reason()));
                }
            }
        } catch (IOException | IllegalArgumentException e) {
            unreadable.add(UnreadableFile.of(file, e));
        }
    }

    /**
     * The crystals that some words may mean.
     *
     * @param words part of a name or id, or a formula; blank for everything
     * @return the crystals, by the names of their files
     * @throws IOException if the folder itself cannot be read
     */
    public List<KeptCrystal> search(String words) throws IOException {
        return list().crystals().stream()
                .filter(k -> CrystalNames.matches(
                        words, k.crystal().formula(), List.of(k.crystal().name(), k.id())))
                .toList();
    }

    /**
     * The crystal of an id.
     *
     * @param id the id, as {@link KeptCrystal#id()} gives it
     * @return the crystal, or empty if the folder has none of that id that can be read
     * @throws IOException if the folder itself cannot be read
     */
    public Optional<KeptCrystal> find(String id) throws IOException {
        List<KeptCrystal> crystals = new ArrayList<>();
        for (Path file : files(path)) {
            if (id.startsWith(name(file).substring(0, name(file).length() - ENDING.length()))) {
                read(file, crystals, new ArrayList<>());
            }
        }
        return crystals.stream().filter(k -> k.id().equals(id)).findFirst();
    }

    /**
     * Adds a crystal, under a file name made of its own name: {@code γ′ phase} is kept in {@code gamma-prime-phase.cif}.
     *
     * @param crystal the crystal
     * @return the crystal as kept; the one that is there already if it is the same to the last bit
     * @throws FileAlreadyExistsException if another crystal is kept under that name; to keep both, give one another name
     * @throws IOException if it cannot be written; the folder is then as it was
     */
    public KeptCrystal add(Crystal crystal) throws IOException {
        return keep(crystal.name(), CrystalCif.file(crystal).toText().getBytes(StandardCharsets.UTF_8));
    }

    /**
     * Adds a CIF as it is, all of its blocks and comments.
     *
     * @param cif the file, whose own name is kept as far as any system can store it
     * @return its crystals as kept, at least one
     * @throws FileAlreadyExistsException if another file of that name is there
     * @throws IOException if it cannot be read or written; the folder is then as it was
     * @throws io.github.zonewright.cif.CifException if it is no CIF
     * @throws CrystalCifException if no block holds a crystal
     */
    public List<KeptCrystal> add(Path cif) throws IOException {
        byte[] bytes = Files.readAllBytes(cif);
        CrystalCif.of(CifFile.read(new ByteArrayInputStream(bytes)));
        String stem = name(cif).replaceFirst("(?i)\\.cif$", "");
        Path file = keep(stem, bytes).file();
        List<KeptCrystal> crystals = new ArrayList<>();
        read(file, crystals, new ArrayList<>());
        return List.copyOf(crystals);
    }

    private KeptCrystal keep(String name, byte[] bytes) throws IOException {
        Files.createDirectories(path);
        Path file = path.resolve(CrystalNames.fileName(name) + ENDING);
        try {
            AtomicFile.create(file, bytes);
        } catch (FileAlreadyExistsException e) {
            if (!Arrays.equals(bytes, Files.readAllBytes(file))) {
                throw new FileAlreadyExistsException(
                        file.toString(), null, "another crystal is kept there; give this one another name");
            }
        }
        List<KeptCrystal> crystals = new ArrayList<>();
        List<UnreadableFile> unreadable = new ArrayList<>();
        read(file, crystals, unreadable);
        return crystals.stream()
                .findFirst()
                .orElseThrow(() -> new IOException("what was kept cannot be read: " + unreadable));
    }

    /**
     * Removes a crystal and its file.
     *
     * @param kept the crystal, as listed
     * @throws NoSuchFileException if it is gone already
     * @throws IOException if the file has changed since it was listed, holds other structures too, or cannot be deleted
     */
    public void remove(KeptCrystal kept) throws IOException {
        List<KeptCrystal> there = new ArrayList<>();
        Path file = path.resolve(name(kept.file()));
        if (Files.notExists(file)) {
            throw new NoSuchFileException(file.toString());
        }
        read(file, there, new ArrayList<>());
        if (there.stream().noneMatch(k -> k.sha256().equals(kept.sha256()))) {
            throw new IOException(file + " has changed since it was listed and was left as it is");
        }
        if (there.size() > 1) {
            throw new IOException(file + " holds " + there.size() + " structures and was left as it is");
        }
        Files.delete(file);
    }
}
