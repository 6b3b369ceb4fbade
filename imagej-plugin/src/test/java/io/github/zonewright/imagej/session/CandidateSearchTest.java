package io.github.zonewright.imagej.session;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import ij.Prefs;
import io.github.zonewright.crystal.Candidate;
import io.github.zonewright.crystal.CandidateList;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.command.Launching;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.Verdict;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The search over several crystals. */
class CandidateSearchTest {
    private static CandidateSearch of(String... names) {
        List<Crystal> crystals =
                Stream.of(names).map(n -> CrystalShelf.find(n).orElseThrow()).toList();
        return new CandidateSearch(crystals, Beam.ofKilovolts(200), TestPatterns.CONSTANT, 0.03, false);
    }

    private static MeasuredPattern measured() {
        return Search.measure(TestPatterns.image());
    }

    @Test
    void run_ranksCrystalsTogether() {
        List<Double> progress = new ArrayList<>();
        SearchResult found = of("periclase", "austenite", "copper").run(measured(), progress::add, () -> false);
        List<Double> scores = found.solutions().stream().map(Solution::score).toList();
        assertEquals(scores.stream().sorted((a, b) -> Double.compare(b, a)).toList(), scores);
        // Their cells differ by less than the told error of the scale: which of the two is first is a matter of chance.
        List<String> firstTwo = found.solutions().stream()
                .limit(2)
                .map(s -> s.placement().crystal().name())
                .sorted()
                .toList();
        assertEquals(List.of("Austenite", "Copper"), firstTwo);
        assertInstanceOf(Verdict.Tied.class, Verdict.of(found));
        assertTrue(found.explanation().contains("3 crystals were tried"), found.explanation());
        assertEquals(progress.stream().sorted().toList(), progress);
        assertTrue(progress.stream().allMatch(p -> p >= 0 && p <= 1));
    }

    @Test
    void run_oneCrystal_isThePlainSearch() {
        SearchResult alone = of("copper").run(measured(), p -> {}, () -> false);
        SearchResult plain = new Search(
                        CrystalShelf.find("copper").orElseThrow(),
                        Beam.ofKilovolts(200),
                        TestPatterns.CONSTANT,
                        0.03,
                        false)
                .run(measured(), p -> {}, () -> false);
        assertEquals(plain.explanation(), alone.explanation());
        assertEquals(plain.solutions().size(), alone.solutions().size());
    }

    @Test
    void run_noneFits_saysWhyForEach() {
        MeasuredPattern pattern = measured();
        SearchResult found = new CandidateSearch(
                        List.of(
                                CrystalShelf.find("diamond").orElseThrow(),
                                CrystalShelf.find("aluminium").orElseThrow()),
                        Beam.ofKilovolts(200),
                        TestPatterns.CONSTANT,
                        0.001,
                        false)
                .run(pattern, p -> {}, () -> false);
        assertEquals(List.of(), found.solutions());
        assertTrue(found.explanation().startsWith("None of the 2 crystals"), found.explanation());
        assertTrue(found.explanation().contains("No orientation of Diamond"), found.explanation());
        assertTrue(found.explanation().contains("No orientation of Aluminium"), found.explanation());
    }

    @Test
    void noCrystal_orWrongScale_isRefused() {
        assertThrows(
                IllegalArgumentException.class,
                () -> new CandidateSearch(List.of(), Beam.ofKilovolts(200), 120, 0.03, false));
        assertThrows(
                IllegalArgumentException.class,
                () -> new CandidateSearch(
                        List.of(CrystalShelf.find("copper").orElseThrow()), Beam.ofKilovolts(200), 0, 0.03, false));
    }

    @Test
    void findZoneAxis_takesAList_andChangesNothingOfTheUsers(@TempDir Path folder) throws IOException {
        Prefs.set(UserFolder.KEY, folder.toString());
        UserFolder.lists()
                .create(CandidateList.named("Metals")
                        .with(Candidate.of(CrystalShelf.entry("periclase").orElseThrow()))
                        .with(Candidate.of(CrystalShelf.entry("copper").orElseThrow())));
        ImagePlus image = TestPatterns.imageOfUser();
        Fingerprint before = Fingerprint.of(image);
        assertEquals(
                Optional.empty(),
                Launching.macro(image, "command.FindZoneAxis", "crystal=Metals kilovolts=200 scale=120 table=false"));
        before.assertSame(image);
        assertEquals(
                "Copper", Sitting.of(image).placement().orElseThrow().crystal().name());
        Prefs.set(UserFolder.KEY, "");
    }
}
