package io.github.zonewright.crystal;

import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CifBlockBuilder;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.cif.CifLoop;
import io.github.zonewright.cif.CifValue;
import java.io.IOException;
import java.nio.file.FileAlreadyExistsException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/**
 * The lists of candidates that a user keeps, each a CIF in the folder {@code candidates} within the folder of crystals.
 *
 * <p>Its one block has the item {@code _zonewright_candidates_name}, what the user calls the list, and a loop with a row
 * for each crystal: {@code _zonewright_candidate_place} is {@code shelf} or {@code folder},
 * {@code _zonewright_candidate_id} the id there, {@code _zonewright_candidate_sha256} the SHA-256 hash of its file and
 * {@code _zonewright_candidate_name} its name when it was put on the list. Files are written whole or not at all.
 */
public final class CandidateFolder {

    private static final String NAME = "_zonewright_candidates_name";
    private static final List<String> COLUMNS = List.of(
            "_zonewright_candidate_place",
            "_zonewright_candidate_id",
            "_zonewright_candidate_sha256",
            "_zonewright_candidate_name");

    private final CrystalFolder crystals;
    private final Path path;

    private CandidateFolder(CrystalFolder crystals) {
        this.crystals = crystals;
        path = crystals.path().resolve("candidates");
    }

    /**
     * What lists there are.
     *
     * @param lists the lists, by the names of their files
     * @param unreadable the files that could not be read, and why
     */
    public record Listing(List<CandidateList> lists, List<UnreadableFile> unreadable) {
        /** Copies the lists. */
        public Listing {
            lists = List.copyOf(lists);
            unreadable = List.copyOf(unreadable);
        }
    }

    /**
     * The lists that are kept with a folder of crystals.
     *
     * @param crystals the folder
     * @return its lists
     */
    public static CandidateFolder in(CrystalFolder crystals) {
        return new CandidateFolder(crystals);
    }

    /**
     * Reads every list.
     *
     * @return the lists, and the files that could not be read; nothing of either if none was ever kept
     * @throws IOException if the folder itself cannot be read
     */
    public Listing list() throws IOException {
        List<CandidateList> lists = new ArrayList<>();
        List<UnreadableFile> unreadable = new ArrayList<>();
        for (Path file : CrystalFolder.files(path)) {
            try {
                lists.add(read(file));
            } catch (IOException | IllegalArgumentException e) {
                unreadable.add(UnreadableFile.of(file, e));
            }
        }
        return new Listing(lists, unreadable);
    }

    /**
     * The list of a name.
     *
     * @param name the name; only its letters and digits count, in any case
     * @return the list, or empty if there is none
     * @throws IOException if it cannot be read
     * @throws io.github.zonewright.cif.CifException if its file is no CIF, or lacks what a list has
     */
    public Optional<CandidateList> find(String name) throws IOException {
        return Files.exists(file(name)) ? Optional.of(read(file(name))) : Optional.empty();
    }

    /**
     * Keeps a new list.
     *
     * @param list the list
     * @throws FileAlreadyExistsException if there is a list of that name
     * @throws IOException if it cannot be written
     */
    public void create(CandidateList list) throws IOException {
        Files.createDirectories(path);
        cif(list).create(file(list.name()));
    }

    /**
     * Keeps a list in the place of the one that has its name, or as a new one.
     *
     * @param list the list
     * @throws IOException if it cannot be written; the one that was kept is then as it was
     */
    public void save(CandidateList list) throws IOException {
        Files.createDirectories(path);
        cif(list).write(file(list.name()));
    }

    /**
     * Gives a list another name.
     *
     * @param from its name
     * @param to the other name
     * @throws NoSuchFileException if there is no list of the first name
     * @throws FileAlreadyExistsException if there is another list of the second name
     * @throws IOException if it cannot be written
     */
    public void rename(String from, String to) throws IOException {
        CandidateList list =
                find(from).orElseThrow(() -> new NoSuchFileException(from)).withName(to);
        if (file(from).equals(file(to))) {
            save(list);
        } else {
            create(list);
            delete(from);
        }
    }

    /**
     * Deletes a list; its crystals stay where they are.
     *
     * @param name its name
     * @throws NoSuchFileException if there is no such list
     * @throws IOException if it cannot be deleted
     */
    public void delete(String name) throws IOException {
        Files.delete(file(name));
    }

    /**
     * Reads the crystals of a list from the shelf and the folder.
     *
     * @param list the list
     * @return its crystals, and what is missing
     * @throws IOException if the folder of crystals itself cannot be read
     */
    public Candidates crystals(CandidateList list) throws IOException {
        List<Crystal> found = new ArrayList<>();
        List<String> missing = new ArrayList<>();
        for (Candidate candidate : list.candidates()) {
            Optional<Crystal> crystal = crystal(candidate);
            crystal.ifPresent(found::add);
            if (crystal.isEmpty()) {
                missing.add(candidate.name() + " (" + candidate.id() + ") is no longer "
                        + (candidate.place() == Candidate.Place.SHELF ? "on the shelf" : "in " + crystals.path())
                        + ", or cannot be read.");
            }
        }
        return new Candidates(found, missing);
    }

    private Optional<Crystal> crystal(Candidate candidate) throws IOException {
        if (candidate.place() == Candidate.Place.SHELF) {
            return CrystalShelf.entry(candidate.id())
                    .map(e -> told(e.crystal(), candidate, Candidate.of(e).sha256()));
        }
        return crystals.find(candidate.id()).map(k -> told(k.crystal(), candidate, k.sha256()));
    }

    private static Crystal told(Crystal crystal, Candidate candidate, String hash) {
        return hash.equals(candidate.sha256())
                ? crystal
                : crystal.withNotices(List.of("The file of " + candidate.name() + " (" + candidate.id()
                        + ") has changed since it was put on the list."));
    }

    private Path file(String name) {
        return path.resolve(CrystalNames.fileName(name) + ".cif");
    }

    private static CifFile cif(CandidateList list) {
        CifBlockBuilder block =
                CifBlock.builder(CrystalNames.fileName(list.name())).add(NAME, list.name());
        if (!list.candidates().isEmpty()) {
            block.add(CifLoop.of(
                    COLUMNS,
                    list.candidates().stream().map(CandidateFolder::row).toList()));
        }
        return CifFile.of(block.build());
    }

    private static List<CifValue> row(Candidate candidate) {
        return List.of(
                CifValue.of(candidate.place().name().toLowerCase(Locale.ROOT)),
                CifValue.of(candidate.id()),
                CifValue.of(candidate.sha256()),
                CifValue.of(candidate.name()));
    }

    private static CandidateList read(Path file) throws IOException {
        CifFile cif = CifFile.read(file);
        for (CifBlock block : cif.blocks()) {
            Optional<CifValue> name = block.value(NAME).filter(CifValue::isKnown);
            if (name.isPresent()) {
                return new CandidateList(name.get().text(), candidates(block));
            }
        }
        throw new IllegalArgumentException("no block has " + NAME + ", expected a list of candidates");
    }

    private static List<Candidate> candidates(CifBlock block) {
        List<Candidate> candidates = new ArrayList<>();
        List<CifValue> places = block.values(COLUMNS.get(0));
        List<List<CifValue>> columns = COLUMNS.stream().map(block::values).toList();
        for (int i = 0; i < places.size(); i++) {
            int row = i;
            if (columns.stream().anyMatch(c -> c.size() <= row || !c.get(row).isKnown())) {
                throw places.get(i).fault("a row needs " + String.join(", ", COLUMNS));
            }
            candidates.add(new Candidate(
                    place(places.get(i)),
                    columns.get(1).get(i).text(),
                    columns.get(2).get(i).text(),
                    columns.get(3).get(i).text()));
        }
        return candidates;
    }

    private static Candidate.Place place(CifValue value) {
        return switch (value.text()) {
            case "shelf" -> Candidate.Place.SHELF;
            case "folder" -> Candidate.Place.FOLDER;
            default -> throw value.fault("shelf or folder was expected");
        };
    }
}
