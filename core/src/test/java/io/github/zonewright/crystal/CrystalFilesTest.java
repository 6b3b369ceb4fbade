package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.cif.CifException;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.reference.ReferenceCsv;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.ArrayList;
import java.util.HexFormat;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Assumptions;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** The 510 CIFs of Debian's libavogadro-data against what gemmi makes of them; skipped where they are not installed. */
class CrystalFilesTest {

    private static final Path ROOT = Path.of("/usr/share/avogadro2/crystals");

    /** Files that differ for a known reason: the expected number of operations and positions, or −1 for a refusal. */
    private static final Map<String, int[]> DISCREPANCIES = Map.of(
            // its one site has no label and no coordinates, which gemmi takes for an unknown atom at 0 0 0
            "halides/AlCl3.cif", new int[] {-1},
            // H1 at (-1, -1, -1) is marked as a dummy in the file and is left out here
            "other/H3N-Ammonia.cif", new int[] {12, 4});

    static List<Map<String, String>> files() {
        return ReferenceCsv.read("crystal-files.csv", ',');
    }

    private static byte[] bytes(Map<String, String> row) throws IOException {
        Path file = ROOT.resolve(row.get("file"));
        Assumptions.assumeTrue(Files.exists(file), "libavogadro-data is not installed: " + file);
        return Files.readAllBytes(file);
    }

    private static int positions(Crystal crystal) {
        List<Vector3> found = new ArrayList<>();
        for (UnitCellAtom atom : crystal.unitCellAtoms()) {
            if (found.stream().noneMatch(p -> same(p, atom.position()))) {
                found.add(atom.position());
            }
        }
        return found.size();
    }

    private static boolean same(Vector3 one, Vector3 other) {
        Vector3 d = one.minus(other);
        double largest = 0;
        for (double x : new double[] {d.x(), d.y(), d.z()}) {
            largest = Math.max(largest, Math.abs(x - Math.rint(x)));
        }
        return largest <= Crystal.SAME_SITE;
    }

    @ParameterizedTest
    @MethodSource("files")
    void read_agreesWithGemmi(Map<String, String> row) throws IOException, NoSuchAlgorithmException {
        String file = row.get("file");
        byte[] bytes = bytes(row);
        String digest =
                HexFormat.of().formatHex(MessageDigest.getInstance("SHA-256").digest(bytes));
        Assumptions.assumeTrue(digest.equals(row.get("sha256")), "another version of " + file);
        int[] known = DISCREPANCIES.get(file);
        if (!row.get("refused").isEmpty() || known != null && known[0] < 0) {
            IllegalArgumentException e =
                    assertThrows(IllegalArgumentException.class, () -> CrystalCif.read(ROOT.resolve(file)));
            assertTrue(e instanceof CifException || e instanceof CrystalCifException);
            assertTrue(e.getMessage().startsWith("line "), e.getMessage());
            return;
        }
        Crystal crystal = CrystalCif.read(ROOT.resolve(file)).get(0);
        assertEquals(
                Double.parseDouble(row.get("volume")),
                crystal.lattice().volume(),
                2e-6 * crystal.lattice().volume());
        int operations = known != null ? known[0] : Integer.parseInt(row.get("operations"));
        int positions = known != null ? known[1] : Integer.parseInt(row.get("positions"));
        assertEquals(operations, crystal.spaceGroup().order());
        assertEquals(positions, positions(crystal), "" + crystal.notices());
    }
}
