package io.github.zonewright.document;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.TestData;
import io.github.zonewright.cif.CifBlock;
import io.github.zonewright.cif.CoreDictionary;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.pattern.Placement;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.OffsetDateTime;
import java.util.List;
import java.util.Locale;
import java.util.Set;
import java.util.TreeSet;
import java.util.concurrent.TimeUnit;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Assumptions;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The data names of a record: those of the dictionary, and those that the package's description defines. */
class FitItemsTest {
    private static final CoreDictionary DICTIONARY = CoreDictionary.load();

    /** A record with every item that a record can have. */
    private static FitDocument full(String fileName) {
        var solution = FitSamples.ordinary();
        Crystal nickel = solution.placement().crystal();
        Crystal noticed =
                new Crystal(nickel.name(), nickel.lattice(), nickel.spaceGroup(), nickel.sites(), List.of("A notice."));
        var placement = new Placement(
                noticed,
                solution.placement().beam(),
                solution.placement().setting(),
                solution.placement().camera());
        return FitDocument.of(new Solution(
                        placement,
                        solution.matches(),
                        solution.unexplained(),
                        solution.rmsResidual(),
                        solution.score(),
                        solution.errors(),
                        solution.halfTurn(),
                        List.of("The lean of 0.3 degrees is uncertain: it is known to 0.6 degrees only."),
                        solution.ownScore()))
                .withImage(ImageReference.of(fileName, 640, 480).withSha256("0f".repeat(32)))
                .createdAt(OffsetDateTime.parse("2026-03-01T14:05:00Z"))
                .createdBy("Zonewright 0.1.0")
                .withFindings(FitSamples.findings())
                .withHandling(FitSamples.handling(640, 480));
    }

    private static List<String> tags() {
        CifBlock block = full("impeller-07.tif").toCif().blocks().get(0);
        return block.tags();
    }

    private static Set<String> ours() {
        return tags().stream()
                .filter(tag -> tag.startsWith("_zonewright_"))
                .collect(Collectors.toCollection(TreeSet::new));
    }

    @Test
    void tags_standardOnes_areInTheCoreDictionary() {
        for (String tag : tags()) {
            if (!tag.startsWith("_zonewright_")) {
                assertTrue(DICTIONARY.contains(tag), tag);
            }
        }
    }

    @Test
    void tags_ours_areNotInTheCoreDictionaryAndShortEnough() {
        for (String tag : ours()) {
            assertFalse(DICTIONARY.contains(tag), tag);
            // CIF 1.1, paragraph 14 of the syntax: a data name has at most 75 characters.
            assertTrue(tag.length() <= 75, tag);
            assertTrue(tag.matches("[a-z0-9_]+"), tag);
        }
    }

    @Test
    void tags_ours_areThoseOfThePackagesDescription() throws IOException {
        Path source = TestData.path("../core/src/main/java/io/github/zonewright/document/package-info.java");
        Matcher rows = Pattern.compile("<tr><td>\\{@code (\\w+)}").matcher(firstTable(Files.readString(source)));
        Set<String> described = new TreeSet<>();
        while (rows.find()) {
            assertTrue(described.add(rows.group(1)), rows.group(1) + " is described twice");
        }
        assertEquals(described, ours());
    }

    /** What the block of a further crystal has beyond the items of a fit. */
    @Test
    void tags_ofAFurtherCrystal_areThoseOfTheSecondTable() throws IOException {
        CifBlock block = full("impeller-07.tif").toCif().blocks().get(1);
        Set<String> more = new TreeSet<>(block.tags());
        more.removeAll(tags());
        Path source = TestData.path("../core/src/main/java/io/github/zonewright/document/package-info.java");
        String[] tables = Files.readString(source).split("</table>");
        Matcher rows = Pattern.compile("<tr><td>\\{@code (\\w+)}").matcher(tables[1]);
        Set<String> described = new TreeSet<>();
        while (rows.find()) {
            assertTrue(described.add(rows.group(1)), rows.group(1) + " is described twice");
        }
        assertEquals(described, more);
        more.forEach(tag -> assertTrue(tag.matches("_zonewright_[a-z0-9_]{1,63}"), tag));
    }

    /** The table of a fit's items; that of a calibration's follows it. */
    private static String firstTable(String description) {
        return description.substring(0, description.indexOf("</table>"));
    }

    @Test
    void tags_standardOnesOfTheDescription_areWritten() {
        List<String> tags = tags();
        for (String tag : List.of(
                "_diffrn_source_voltage",
                "_diffrn_radiation_probe",
                "_diffrn_radiation_wavelength",
                "_diffrn_orient_matrix_type",
                "_diffrn_orient_matrix_UB_11",
                "_diffrn_orient_matrix_UB_33",
                "_diffrn_refln_index_h",
                "_diffrn_refln_intensity_net",
                "_audit_creation_date",
                "_computing_data_reduction",
                "_cell_length_a",
                "_space_group_symop_operation_xyz",
                "_atom_site_fract_x")) {
            assertTrue(tags.contains(tag), tag);
        }
    }

    /** {@code cif_parse} of the Debian package cod-tools; it complains on the error stream and yet exits with 0. */
    @Test
    void otherReader_hasNoComplaint(@TempDir Path folder) throws IOException, InterruptedException {
        Path parser = Path.of("/usr/bin/cif_parse");
        Assumptions.assumeTrue(
                Files.isExecutable(parser), "cif_parse of the Debian package cod-tools is not installed");
        for (String name : List.of("impeller-07.tif", "Größe α '\"3\".tif", "data_ 'x' \"y\" # _z.tif")) {
            Path record = folder.resolve("record.cif");
            full(name).write(record);
            Path parsed = folder.resolve("parsed.json");
            Path complaints = folder.resolve("complaints.txt");
            Process process = new ProcessBuilder(parser.toString(), "--output-json", record.toString())
                    .redirectOutput(parsed.toFile())
                    .redirectError(complaints.toFile())
                    .start();
            assertTrue(process.waitFor(60, TimeUnit.SECONDS), "cif_parse did not end");
            for (String line : Files.readAllLines(complaints)) {
                assertTrue(line.contains("NOTE, 0 error(s)"), line);
            }
            assertEquals(0, process.exitValue());
            String json = Files.readString(parsed);
            for (String tag : tags()) {
                // It gives names in lower case.
                assertTrue(json.contains('"' + tag.toLowerCase(Locale.ROOT) + '"'), tag);
            }
            assertTrue(json.contains(full(name)
                    .toCif()
                    .blocks()
                    .get(0)
                    .value("_zonewright_rotation")
                    .orElseThrow()
                    .text()));
        }
    }
}
