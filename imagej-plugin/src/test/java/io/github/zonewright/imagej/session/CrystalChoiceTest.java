package io.github.zonewright.imagej.session;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.Prefs;
import io.github.zonewright.crystal.Candidate;
import io.github.zonewright.crystal.CandidateList;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.crystal.KeptCrystal;
import io.github.zonewright.crystal.StructureType;
import io.github.zonewright.imagej.command.CrystalReport;
import io.github.zonewright.imagej.command.Launching;
import java.io.File;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Stream;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Crystals by name, by formula, from the user's folder, from lists and from files; and the commands that keep and show. */
class CrystalChoiceTest {
    @TempDir
    Path folder;

    @TempDir
    Path files;

    @BeforeEach
    void useFolder() {
        Prefs.set(UserFolder.KEY, folder.toString());
    }

    @AfterEach
    void leaveFolder() {
        Prefs.set(UserFolder.KEY, "");
    }

    private static Crystal copper() {
        return CrystalShelf.find("copper").orElseThrow();
    }

    @Test
    void folder_isBesideThePreferences_andNotMadeByLooking() {
        Prefs.set(UserFolder.KEY, "");
        Path usual = UserFolder.crystals().path();
        assertEquals("zonewright", usual.getFileName().toString());
        Prefs.set(UserFolder.KEY, folder.resolve("new").toString());
        CrystalOffers.now(List.of());
        assertFalse(Files.exists(folder.resolve("new")));
    }

    @Test
    void of_nameFormulaIdAndPath() throws IOException {
        KeptCrystal kept = UserFolder.keep(copper().withName("x"), "Bearing copper");
        assertEquals("Bearing copper", CrystalChoice.of("bearing COPPER", null).name());
        assertEquals("Bearing copper", CrystalChoice.of("bearing-copper", null).name());
        assertEquals("Cementite", CrystalChoice.of("Fe3C", null).name());
        assertEquals("Copper", CrystalChoice.of("Copper", null).name());
        assertEquals(
                "Bearing copper", CrystalChoice.of(kept.file().toString(), null).name());
        assertEquals(
                "Bearing copper",
                CrystalChoice.of("not read", kept.file().toFile()).name());
    }

    @Test
    void of_formulaOfTheUsersAlone() throws IOException {
        Crystal odd =
                TypedCrystal.ofType("Odd salt", StructureType.of("B1"), Map.of(), List.of("Rb", "Br"), List.of(6.89));
        UserFolder.keep(odd, "Odd salt");
        assertEquals("Odd salt", CrystalChoice.of("RbBr", null).name());
    }

    @Test
    void of_fileWithSeveral_asksForANumber() throws IOException {
        Path two = files.resolve("two.cif");
        Files.writeString(two, twoStructures(), StandardCharsets.UTF_8);
        IllegalArgumentException refused =
                assertThrows(IllegalArgumentException.class, () -> CrystalChoice.of(two.toString(), null));
        assertTrue(refused.getMessage().contains("#1 to #2"), refused.getMessage());
        assertTrue(refused.getMessage().contains("Copper, Gold"), refused.getMessage());
        assertEquals("Gold", CrystalChoice.of(two + "#2", null).name());
        assertEquals("Gold", CrystalChoice.of("", new File(two + "#2")).name());
        assertThrows(IllegalArgumentException.class, () -> CrystalChoice.of(two + "#3", null));
        assertThrows(IllegalArgumentException.class, () -> CrystalChoice.of(two + "#0", null));
    }

    private String twoStructures() throws IOException {
        CrystalCif.write(copper(), files.resolve("a.cif"));
        CrystalCif.write(CrystalShelf.find("gold").orElseThrow(), files.resolve("b.cif"));
        return Files.readString(files.resolve("a.cif"), StandardCharsets.UTF_8)
                + Files.readString(files.resolve("b.cif"), StandardCharsets.UTF_8)
                        .replaceFirst("(?m)^#.*\\R", "");
    }

    @Test
    void group_namesAList_andSaysWhatIsMissing() throws IOException {
        KeptCrystal mine = UserFolder.keep(copper(), "Bearing copper");
        CandidateList list = CandidateList.named("Bearing metals")
                .with(Candidate.of(CrystalShelf.search("white tin").get(0)))
                .with(Candidate.of(mine));
        UserFolder.lists().create(list);
        assertEquals(
                List.of("White tin", "Bearing copper"),
                CrystalChoice.group("bearing metals", null).stream()
                        .map(Crystal::name)
                        .toList());
        assertThrows(IllegalArgumentException.class, () -> CrystalChoice.of("bearing metals", null));
        UserFolder.crystals().remove(mine);
        IllegalArgumentException gone =
                assertThrows(IllegalArgumentException.class, () -> CrystalChoice.group("Bearing metals", null));
        assertTrue(gone.getMessage().contains("Bearing copper"), gone.getMessage());
    }

    @Test
    void keep_neverOverwrites_andTakesNoNameOfTheShelf() throws IOException {
        KeptCrystal first = UserFolder.keep(copper(), "Mine");
        byte[] before = Files.readAllBytes(first.file());
        assertThrows(
                IllegalArgumentException.class,
                () -> UserFolder.keep(CrystalShelf.find("gold").orElseThrow(), "Mine"));
        assertEquals(
                new String(before, StandardCharsets.UTF_8), Files.readString(first.file(), StandardCharsets.UTF_8));
        assertThrows(IllegalArgumentException.class, () -> UserFolder.keep(copper(), " gold "));
        assertThrows(IllegalArgumentException.class, () -> UserFolder.keep(copper(), " "));
        try (Stream<Path> there = Files.list(folder)) {
            assertEquals(1, there.count());
        }
    }

    @Test
    void offers_rankNamesThatBeginSo_andToldTroubles() throws IOException {
        Files.writeString(folder.resolve("broken.cif"), "data_x\n_cell_length_a five\n", StandardCharsets.UTF_8);
        CrystalOffers now = CrystalOffers.now(List.of());
        assertEquals(1, now.troubles().size());
        assertTrue(
                now.troubles().get(0).contains("broken.cif: line 2"),
                now.troubles().toString());
        List<String> names =
                now.matching("titan").stream().map(CrystalOffer::name).toList();
        assertTrue(names.indexOf("Titanium carbide") < names.indexOf("Beta titanium"), names.toString());
        assertTrue(names.indexOf("Beta titanium") < names.indexOf("Gamma titanium aluminide"), names.toString());
        assertEquals("Alpha titanium", now.matching("Ti").get(0).name());
        assertEquals("Cementite", now.matching("CFe3").get(0).name());
        assertEquals(now.offers(), now.matching(""));
        assertEquals(List.of(), now.matching("unobtainium"));
    }

    @Test
    void report_hasFactsNoticesAndCaution() {
        CrystalReport thallium = CrystalReport.of(CrystalShelf.find("TlCl").orElseThrow());
        assertTrue(
                thallium.cautions().get(0).startsWith("CAUTION: thallium"),
                thallium.cautions().toString());
        assertEquals(List.of(), thallium.notices());
        Crystal typed = TypedCrystal.ofType("", StructureType.of("B2"), Map.of(), List.of("Tl", "Br"), List.of(3.98));
        assertTrue(CrystalReport.of(typed).cautions().get(0).contains("toxic"));
        CrystalReport copper = CrystalReport.of(copper());
        assertEquals(List.of(), copper.cautions());
        assertTrue(
                copper.facts().contains("Space group F m -3 m, No. 225"),
                copper.facts().toString());
    }

    @Test
    void keepCommand_keeps_andShowCommand_findsIt() {
        assertEquals(
                Optional.empty(), Launching.macro(null, "command.KeepCrystal", "crystal=copper keepas=[Shaft copper]"));
        assertTrue(Files.exists(folder.resolve("shaft-copper.cif")));
        assertEquals(
                Optional.empty(), Launching.macro(null, "command.ShowCrystal", "crystal=[Shaft copper] smallestd=1"));
    }

    @Test
    void commands_badInput_isASentence() {
        for (String options : List.of("crystal=unobtainium", "crystal=copper keepas=Gold", "crystal=/no/such.cif")) {
            Optional<String> said = Launching.macro(null, "command.KeepCrystal", options);
            assertTrue(said.isPresent() && said.get().matches(".*[.?]"), options + " " + said);
        }
        for (String options : List.of("crystal=copper smallestd=0", "crystal=copper smallestd=x", "crystal=[]")) {
            Optional<String> said = Launching.macro(null, "command.ShowCrystal", options);
            assertTrue(said.isPresent(), options);
        }
        assertFalse(Files.exists(folder.resolve("gold.cif")));
    }
}
