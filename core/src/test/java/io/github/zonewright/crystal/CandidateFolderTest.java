package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.FileAlreadyExistsException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.List;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class CandidateFolderTest {

    private static final Candidate FERRITE =
            Candidate.of(CrystalShelf.entry("ferrite").orElseThrow());
    private static final Candidate CEMENTITE =
            Candidate.of(CrystalShelf.entry("cementite").orElseThrow());

    @TempDir
    private Path temp;

    private CrystalFolder crystals;
    private CandidateFolder lists;

    @BeforeEach
    void start() {
        crystals = CrystalFolder.at(temp);
        lists = CandidateFolder.in(crystals);
    }

    private static List<String> names(List<CandidateList> lists) {
        return lists.stream().map(CandidateList::name).toList();
    }

    @Test
    void create_readsBackTheSame() throws IOException {
        assertEquals(new CandidateFolder.Listing(List.of(), List.of()), lists.list());
        KeptCrystal mine =
                crystals.add(StructureType.of("A2").crystal(List.of("Fe"), 2.88).withName("our δ ferrite"));
        CandidateList steel = CandidateList.named("Phases of shaft steel, Harrow Quay pump works")
                .with(FERRITE)
                .with(CEMENTITE)
                .with(Candidate.of(mine));
        lists.create(steel);
        assertEquals(
                steel,
                lists.find("phases of shaft steel - harrow quay PUMP works").orElseThrow());
        assertEquals(
                List.of(steel),
                CandidateFolder.in(CrystalFolder.at(temp)).list().lists());
        Candidates read = lists.crystals(steel);
        assertEquals(
                List.of("Ferrite", "Cementite", "our δ ferrite"),
                read.crystals().stream().map(Crystal::name).toList());
        assertEquals(List.of(), read.missing());
        assertTrue(read.crystals().stream().allMatch(c -> c.notices().isEmpty()));
        assertEquals(1, crystals.list().crystals().size(), "the list is no crystal");
        assertEquals(0, crystals.list().unreadable().size(), "the list is no broken crystal");
    }

    @Test
    void create_andSave_emptyAndChanged() throws IOException {
        CandidateList empty = CandidateList.named("steel");
        lists.create(empty);
        assertEquals(empty, lists.find("steel").orElseThrow());
        assertThrows(FileAlreadyExistsException.class, () -> lists.create(empty.with(FERRITE)));
        assertEquals(empty, lists.find("steel").orElseThrow());
        lists.save(empty.with(FERRITE).with(CEMENTITE));
        lists.save(lists.find("steel").orElseThrow().without(FERRITE));
        assertEquals(List.of(CEMENTITE), lists.find("steel").orElseThrow().candidates());
        lists.delete("steel");
        assertTrue(lists.find("steel").isEmpty());
        assertThrows(NoSuchFileException.class, () -> lists.delete("steel"));
    }

    @Test
    void rename_keepsTheEntries() throws IOException {
        lists.create(CandidateList.named("steel").with(FERRITE));
        lists.create(CandidateList.named("other"));
        lists.rename("steel", "Steel");
        assertEquals(List.of("other", "Steel"), names(lists.list().lists()));
        lists.rename("Steel", "shaft");
        assertEquals(List.of("other", "shaft"), names(lists.list().lists()));
        assertEquals(List.of(FERRITE), lists.find("shaft").orElseThrow().candidates());
        assertThrows(FileAlreadyExistsException.class, () -> lists.rename("shaft", "other"));
        assertThrows(NoSuchFileException.class, () -> lists.rename("none", "some"));
        assertEquals(2, lists.list().lists().size());
    }

    @Test
    void crystals_saysWhatIsMissingOrChanged() throws IOException {
        KeptCrystal one =
                crystals.add(StructureType.of("A2").crystal(List.of("Fe"), 2.88).withName("one"));
        KeptCrystal two =
                crystals.add(StructureType.of("A2").crystal(List.of("Fe"), 2.89).withName("two"));
        Candidate gone = new Candidate(Candidate.Place.SHELF, "unobtainium", FERRITE.sha256(), "Unobtainium");
        CandidateList list = CandidateList.named("x")
                .with(Candidate.of(one))
                .with(Candidate.of(two))
                .with(gone);
        crystals.remove(one);
        CrystalCif.write(StructureType.of("A2").crystal(List.of("Fe"), 2.90).withName("two"), two.file());
        Candidates read = lists.crystals(list);
        assertEquals(1, read.crystals().size());
        assertTrue(read.crystals().get(0).notices().get(0).contains("has changed"), "" + read);
        assertEquals(2, read.missing().size());
        assertTrue(read.missing().get(0).startsWith("one (one) is no longer in "), "" + read.missing());
        assertTrue(read.missing().get(1).startsWith("Unobtainium (unobtainium) is no longer on the shelf"));
        CandidateList renewed = list.with(Candidate.of(crystals.find("two").orElseThrow()));
        assertEquals(3, renewed.candidates().size());
        assertTrue(lists.crystals(renewed).crystals().get(0).notices().isEmpty());
    }

    @Test
    void list_saysWhatCannotBeRead() throws IOException {
        lists.create(CandidateList.named("good").with(FERRITE));
        Path folder = temp.resolve("candidates");
        String good = Files.readString(folder.resolve("good.cif"), StandardCharsets.UTF_8);
        Files.writeString(
                folder.resolve("bad-place.cif"),
                good.replace(" shelf", " attic").replace("\nshelf", "\nattic"));
        Files.writeString(folder.resolve("bad-hash.cif"), good.replace(FERRITE.sha256(), "abc"));
        Files.writeString(folder.resolve("bad-row.cif"), good.replace(FERRITE.sha256(), "?"));
        Files.writeString(folder.resolve("no-list.cif"), "data_x\n_cell_length_a 4\n");
        Files.writeString(folder.resolve("no-cif.cif"), "steel");
        CandidateFolder.Listing listing = lists.list();
        assertEquals(List.of("good"), names(listing.lists()));
        assertEquals(5, listing.unreadable().size(), "" + listing);
        listing.unreadable().forEach(u -> assertTrue(!u.reason().isBlank(), "" + u));
        assertTrue(listing.unreadable().get(1).reason().contains("shelf or folder"), "" + listing.unreadable());
    }

    @Test
    void candidateList_refusesWhatCannotBe() {
        assertThrows(IllegalArgumentException.class, () -> CandidateList.named(" "));
        assertThrows(IllegalArgumentException.class, () -> new CandidateList("x", List.of(FERRITE, FERRITE)));
        assertThrows(
                IllegalArgumentException.class,
                () -> new Candidate(Candidate.Place.SHELF, "ferrite", "abc", "Ferrite"));
        assertThrows(
                IllegalArgumentException.class,
                () -> new Candidate(Candidate.Place.SHELF, " ", FERRITE.sha256(), "Ferrite"));
        assertEquals(
                List.of(),
                CandidateList.named("x").with(FERRITE).without(FERRITE).candidates());
        assertEquals("y", CandidateList.named("x").withName("y").name());
    }
}
