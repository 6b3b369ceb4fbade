package io.github.zonewright.symmetry;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.reference.ReferenceCsv;
import java.nio.charset.StandardCharsets;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.TreeSet;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;

/** All 559 settings against gemmi 0.5.7 (530 of them agree with cctbx and spglib). */
class SpaceGroupTableTest {

    private static final List<Map<String, String>> ROWS = ReferenceCsv.read("space-group-settings.csv", ',');

    private static String sha256(String text) throws NoSuchAlgorithmException {
        byte[] digest = MessageDigest.getInstance("SHA-256").digest(text.getBytes(StandardCharsets.UTF_8));
        return HexFormat.of().formatHex(digest);
    }

    private static String canonical(SymmetryOperation operation) {
        StringBuilder text = new StringBuilder();
        for (int i = 0; i < 9; i++) {
            text.append(operation.rotation(i / 3, i % 3)).append(',');
        }
        for (int i = 0; i < 3; i++) {
            assertEquals(0, operation.translation(i) % 30, "not a 24th: " + operation);
            text.append(operation.translation(i) / 30).append(i < 2 ? "," : "");
        }
        return text.toString();
    }

    private static String absences(SpaceGroup group) {
        StringBuilder text = new StringBuilder();
        for (int h = -4; h <= 4; h++) {
            for (int k = -4; k <= 4; k++) {
                for (int l = -4; l <= 4; l++) {
                    text.append(group.isSystematicallyAbsent(new Hkl(h, k, l)) ? '1' : '0');
                }
            }
        }
        return text.toString();
    }

    @Test
    void ofHall_operationsAndClassesOfEverySetting() throws Exception {
        assertEquals(559, ROWS.size());
        for (Map<String, String> row : ROWS) {
            SpaceGroup group = SpaceGroup.ofHall(row.get("hall"));
            String name = row.toString();
            String operations = group.operations().stream()
                    .map(SpaceGroupTableTest::canonical)
                    .sorted()
                    .collect(Collectors.joining(";"));
            assertEquals(row.get("ops_sha256"), sha256(operations), name);
            assertEquals(row.get("order"), "" + group.order(), name);
            assertEquals(row.get("centring"), "" + group.centring(), name);
            String pointGroup = row.get("point_group");
            assertEquals(pointGroup, group.pointGroup().symbol(), name);
            assertEquals(row.get("laue"), group.laueClass().symbol(), name);
            assertEquals(
                    group.laueClass().properOrder(), group.properLaueRotations().size(), name);
            assertEquals(SymmetryOperation.IDENTITY, group.operations().get(0), name);
        }
    }

    @Test
    void isSystematicallyAbsent_ofEverySetting() throws Exception {
        for (Map<String, String> row : ROWS) {
            String absences = absences(SpaceGroup.ofHall(row.get("hall")));
            assertEquals(row.get("absent_sha256"), sha256(absences), row.toString());
            assertEquals(
                    row.get("n_absent_729"),
                    "" + absences.chars().filter(c -> c == '1').count());
        }
    }

    /** The list of operations makes the same group as the Hall symbol, and the group is found again. */
    @Test
    void ofOperations_everySettingAndBack() {
        for (Map<String, String> row : ReferenceCsv.read("space-group-operations.csv", ';')) {
            List<SymmetryOperation> listed = List.of(row.get("triplets").split(" ")).stream()
                    .map(SymmetryOperation::parse)
                    .toList();
            SpaceGroup group = SpaceGroup.ofOperations(listed);
            assertEquals(SpaceGroup.ofHall(row.get("hall")), group);
            assertEquals(
                    row.get("number"),
                    "" + SpaceGroups.identify(group).orElseThrow().number(),
                    row.get("xhm"));
        }
    }

    @Test
    void find_everySettingByItsSymbolWithAndWithoutSpacesAndByHall() {
        for (Map<String, String> row : ROWS) {
            String symbol = row.get("xhm");
            for (String written :
                    List.of(symbol, symbol.replace(" ", ""), symbol.toUpperCase(), symbol.replace(' ', '_'))) {
                List<SpaceGroupSetting> found = SpaceGroups.candidates(written);
                assertTrue(found.stream().anyMatch(s -> s.hall().equals(row.get("hall"))), written + " -> " + found);
                Set<String> numbers = new TreeSet<>();
                found.forEach(s -> numbers.add("" + s.number()));
                assertEquals(Set.of(row.get("number")), numbers, written);
            }
            SpaceGroupSetting byHall = SpaceGroups.byHall(row.get("hall")).orElseThrow();
            assertEquals(row.get("number"), "" + byHall.number());
            assertEquals(row.get("hall"), byHall.hall());
        }
    }

    /** Numbers of International Tables A (check values SG-01 to SG-14). */
    @Test
    void settings_countsOfInternationalTables() {
        List<SpaceGroup> types = java.util.stream.IntStream.rangeClosed(1, 230)
                .mapToObj(n -> SpaceGroups.standard(n).group())
                .toList();
        assertEquals(92, types.stream().filter(SpaceGroup::isCentrosymmetric).count());
        assertEquals(
                65,
                types.stream()
                        .filter(g -> g.rotations().stream().allMatch(r -> r.determinant() > 0))
                        .count());
        assertEquals(32, types.stream().map(SpaceGroup::pointGroup).distinct().count());
        assertEquals(11, types.stream().map(SpaceGroup::laueClass).distinct().count());
        int[][] orders = {{225, 192}, {227, 192}, {229, 96}, {221, 48}, {194, 24}, {167, 36}, {62, 8}, {14, 4}, {2, 2}};
        for (int[] order : orders) {
            assertEquals(order[1], types.get(order[0] - 1).order());
        }
    }
}
