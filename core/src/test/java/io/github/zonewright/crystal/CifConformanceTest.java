package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.File;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.DoubleStream;
import java.util.stream.Stream;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** What the library writes is a CIF to the parser of Debian's {@code cod-tools} too, without an error or a warning. */
class CifConformanceTest {

    private static final String PARSER = "cif_parse";

    @TempDir
    private Path temp;

    @BeforeAll
    static void parserIsThere() {
        boolean found = Stream.of(System.getenv().getOrDefault("PATH", "").split(File.pathSeparator))
                .anyMatch(folder -> Files.isExecutable(Path.of(folder, PARSER)));
        assumeTrue(found, "skipped: " + PARSER + " of the Debian package cod-tools is not installed");
    }

    /** One call for all files: the parser's start takes longer than its work. */
    private void parse(List<Path> files) throws IOException, InterruptedException {
        Path complaints = temp.resolve("complaints.txt");
        List<String> command = new ArrayList<>(List.of(PARSER));
        files.forEach(f -> command.add(f.toString()));
        int code = new ProcessBuilder(command)
                .redirectOutput(ProcessBuilder.Redirect.DISCARD)
                .redirectError(complaints.toFile())
                .start()
                .waitFor();
        List<String> lines = Files.readAllLines(complaints, StandardCharsets.UTF_8).stream()
                .filter(line -> !line.endsWith("NOTE, 0 error(s) encountered while processing the file."))
                .toList();
        assertEquals(List.of(), lines);
        assertEquals(0, code);
    }

    @Test
    void write_everyCrystalOfTheShelf() throws IOException, InterruptedException {
        List<Path> files = new ArrayList<>();
        for (ShelfEntry entry : CrystalShelf.entries()) {
            Path written = temp.resolve(entry.id() + ".cif");
            CrystalCif.write(entry.crystal(), written);
            files.add(written);
            Path resource = temp.resolve(entry.id() + "-as-it-is.cif");
            files.add(Files.write(resource, CrystalShelf.bytes(entry.id())));
        }
        parse(files);
    }

    @Test
    void add_crystalsTypedInAndLists() throws IOException, InterruptedException {
        CrystalFolder folder = CrystalFolder.at(temp.resolve("mine"));
        CandidateFolder lists = CandidateFolder.in(folder);
        List<Path> files = new ArrayList<>();
        CandidateList all = CandidateList.named("α′, \"β\" and 'γ″' of Harrow Quay; loop_ data_x");
        for (StructureType type : StructureType.all()) {
            double[] edges =
                    DoubleStream.of(5, 6.7, 4.5).limit(type.edges().size()).toArray();
            KeptCrystal kept = folder.add(type.crystal(type.roles(), edges));
            files.add(kept.file());
            all = all.with(Candidate.of(kept));
        }
        Crystal doubtful = Crystal.builder("_odd 'name'; of #1 ξ")
                .spaceGroup("Fd-3m")
                .edges(5.43)
                .site("Si4+", "0.1249", "1/8", "1/8", 0.5, new Displacement.Anisotropic(.01, .01, .01, 0, 0, 0))
                .build();
        files.add(folder.add(doubtful).file());
        lists.create(all);
        lists.create(CandidateList.named("empty"));
        try (Stream<Path> kept = Files.list(folder.path().resolve("candidates"))) {
            kept.forEach(files::add);
        }
        parse(files);
    }
}
