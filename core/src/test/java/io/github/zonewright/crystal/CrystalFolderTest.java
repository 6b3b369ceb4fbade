package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.TestData;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.lattice.Lattice;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.FileAlreadyExistsException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.Callable;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class CrystalFolderTest {

    private static final Crystal ALLOY =
            StructureType.of("A1").crystal(List.of("Al"), 4.06).withName("γ′ alloy 7");

    @TempDir
    private Path temp;

    private CrystalFolder folder;

    @BeforeEach
    void start() {
        folder = CrystalFolder.at(temp.resolve("mine"));
    }

    private List<String> files() throws IOException {
        try (var entries = Files.list(folder.path())) {
            return entries.map(f -> f.getFileName().toString()).sorted().toList();
        }
    }

    private void put(String name, String text) throws IOException {
        Files.createDirectories(folder.path());
        Files.writeString(folder.path().resolve(name), text, StandardCharsets.UTF_8);
    }

    @Test
    void list_ofNoFolder() throws IOException {
        assertEquals(new CrystalFolder.Listing(List.of(), List.of()), folder.list());
        assertFalse(Files.exists(folder.path()), "reading made the folder");
    }

    @Test
    void add_readsBackTheSame() throws IOException {
        KeptCrystal kept = folder.add(ALLOY);
        assertEquals("gamma-prime-alloy-7", kept.id());
        assertEquals(List.of("gamma-prime-alloy-7.cif"), files());
        KeptCrystal found = CrystalFolder.at(folder.path()).find(kept.id()).orElseThrow();
        assertEquals(kept, found);
        assertEquals("γ′ alloy 7", found.crystal().name());
        assertEquals(
                ALLOY.sites().get(0).position(), found.crystal().sites().get(0).position());
        assertEquals(4.06, found.crystal().lattice().a());
        assertEquals("γ′ alloy 7 (Al)", found.toString());
    }

    @Test
    void add_neverOverwritesAnother() throws IOException {
        KeptCrystal first = folder.add(ALLOY);
        assertEquals(first, folder.add(ALLOY), "the same again is no other");
        Crystal other = StructureType.of("A1").crystal(List.of("Al"), 4.07).withName(ALLOY.name());
        assertThrows(FileAlreadyExistsException.class, () -> folder.add(other));
        assertEquals(List.of(first), folder.list().crystals());
        folder.add(other.withName("another alloy"));
        assertEquals(2, folder.list().crystals().size());
        assertEquals(2, files().size(), "no files left over: " + files());
    }

    /** Sixteen writers, one name, sixteen crystals: one of them is kept whole, the others are refused. */
    @Test
    void add_atOnce() throws Exception {
        ExecutorService pool = Executors.newFixedThreadPool(8);
        List<Callable<Boolean>> jobs = new ArrayList<>();
        for (int i = 0; i < 16; i++) {
            Crystal one =
                    StructureType.of("A1").crystal(List.of("Al"), 4 + 0.01 * i).withName("one");
            jobs.add(() -> {
                try {
                    folder.add(one);
                    return true;
                } catch (FileAlreadyExistsException e) {
                    return false;
                }
            });
        }
        int kept = 0;
        for (Future<Boolean> done : pool.invokeAll(jobs)) {
            kept += done.get() ? 1 : 0;
        }
        pool.shutdown();
        assertEquals(1, kept);
        assertEquals(List.of("one.cif"), files());
        assertEquals(1, folder.list().crystals().size());
    }

    @Test
    void add_aFileAsItIs() throws IOException {
        Path rutile = TestData.path("cif/TiO2-Rutile.cif");
        List<KeptCrystal> kept = folder.add(rutile);
        assertEquals("O2 Ti", kept.get(0).crystal().formula());
        assertEquals("tio2-rutile", kept.get(0).id());
        assertEquals(-1, Files.mismatch(rutile, kept.get(0).file()));
        assertThrows(NoSuchFileException.class, () -> folder.add(temp.resolve("none.cif")));
        Path text = Files.writeString(temp.resolve("text.cif"), "no CIF", StandardCharsets.UTF_8);
        assertThrows(IllegalArgumentException.class, () -> folder.add(text));
        assertEquals(1, files().size());
    }

    @Test
    void list_saysWhatCannotBeRead() throws IOException {
        folder.add(ALLOY);
        put("broken.cif", "data_x\n_cell_length_a 'open\n");
        put("empty.cif", "");
        put("paper.cif", "data_global\n_journal_year 1999\n");
        put(".hidden.cif", "no CIF");
        put("notes.txt", "no CIF");
        Files.createDirectories(folder.path().resolve("folder.cif"));
        Files.createDirectories(folder.path().resolve("candidates"));
        CrystalFolder.Listing listing = folder.list();
        assertEquals(1, listing.crystals().size());
        assertEquals(
                List.of("broken.cif", "empty.cif", "paper.cif"),
                listing.unreadable().stream()
                        .map(u -> u.file().getFileName().toString())
                        .toList());
        assertTrue(listing.unreadable().get(0).toString().contains("line 2"), "" + listing.unreadable());
        assertTrue(listing.unreadable().get(2).reason().contains("expected a crystal"), "" + listing.unreadable());
    }

    @Test
    void list_fileOfSeveralStructures() throws IOException {
        Crystal second = ALLOY.withName("second");
        String broken = "\ndata_bad\n_cell_length_a ?\n";
        put(
                "two.cif",
                CifFile.of(CrystalCif.toBlock(ALLOY), CrystalCif.toBlock(second))
                                .toText()
                        + broken);
        CrystalFolder.Listing listing = folder.list();
        assertEquals(
                List.of("two", "two#2"),
                listing.crystals().stream().map(KeptCrystal::id).toList());
        assertTrue(listing.unreadable().get(0).reason().contains("_cell_length_a"), "" + listing.unreadable());
        assertEquals("second", folder.find("two#2").orElseThrow().crystal().name());
        assertThrows(IOException.class, () -> folder.remove(listing.crystals().get(0)));
        assertEquals(List.of("two.cif"), files());
    }

    @Test
    void search_byNameIdOrFormula() throws IOException {
        folder.add(ALLOY);
        folder.add(Crystal.of("Steel B", Lattice.cubic(2.87), "I m -3 m", AtomSite.of("Fe", 0, 0, 0)));
        assertEquals(1, folder.search("ALLOY").size());
        assertEquals(1, folder.search("gamma").size());
        assertEquals(1, folder.search("Fe").size());
        assertEquals(2, folder.search("").size());
        assertEquals(0, folder.search("copper").size());
    }

    @Test
    void remove_onlyWhatWasListed() throws IOException {
        KeptCrystal kept = folder.add(ALLOY);
        Crystal other = StructureType.of("A1").crystal(List.of("Al"), 4.07).withName(ALLOY.name());
        CrystalCif.write(other, kept.file());
        assertThrows(IOException.class, () -> folder.remove(kept), "it is another by now");
        folder.remove(folder.list().crystals().get(0));
        assertEquals(List.of(), files());
        assertThrows(NoSuchFileException.class, () -> folder.remove(kept));
    }
}
