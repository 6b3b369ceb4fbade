package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.Orientation;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/** The known answer of one test pattern, and what it means to be right. */
public record PatternTruth(Map<String, String> row) {

    /** How far an answer is from the truth: in all, in the image plane, and in the direction of the beam; degrees. */
    public record Error(double total, double inPlane, double tilt, String against) {}

    /** Reads a comma-separated table whose first line that is no comment names the columns. */
    public static List<Map<String, String>> table(Path csv) {
        try {
            List<String> lines = Files.readAllLines(csv).stream()
                    .filter(l -> !l.startsWith("#"))
                    .toList();
            String[] names = lines.get(0).split(",", -1);
            List<Map<String, String>> rows = new ArrayList<>();
            for (String line : lines.subList(1, lines.size())) {
                String[] cells = line.split(",", -1);
                Map<String, String> row = new LinkedHashMap<>();
                for (int i = 0; i < names.length; i++) {
                    row.put(names[i], cells[i]);
                }
                rows.add(row);
            }
            return rows;
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    public String file() {
        return row.get("file");
    }

    public String level() {
        return row.get("level");
    }

    /** Whether the image shows no pattern that could be indexed. */
    public boolean isNegative() {
        return row.get("u").isEmpty();
    }

    public double number(String column) {
        return Double.parseDouble(row.get(column));
    }

    public PixelPoint centre() {
        return new PixelPoint(number("centre_x"), number("centre_y"));
    }

    public Uvw zone() {
        return new Uvw((int) number("u"), (int) number("v"), (int) number("w"));
    }

    public Rotation rotation() {
        return Rotation.ofMatrix(new Matrix3(
                number("R11"),
                number("R12"),
                number("R13"),
                number("R21"),
                number("R22"),
                number("R23"),
                number("R31"),
                number("R32"),
                number("R33")));
    }

    /**
     * The error of an orientation against the truth or the nearest listed exact, near or twin alternative, modulo the proper
     * rotations of the Laue class and, where only the zero layer is seen, half a turn about the zone axis.
     */
    public Error errorOf(Crystal crystal, Orientation orientation) {
        List<Rotation> symmetry = crystal.spaceGroup().properLaueRotations(crystal.lattice()).stream()
                .map(Rotation::ofMatrix)
                .toList();
        Error best = null;
        for (Map.Entry<String, Rotation> answer : answers(crystal).entrySet()) {
            for (Rotation q : symmetry) {
                Rotation off =
                        orientation.rotation().after(answer.getValue().after(q).inverse());
                Vector3 v = off.axis().times(Math.toDegrees(off.angle()));
                Error e = new Error(v.norm(), Math.abs(v.z()), Math.hypot(v.x(), v.y()), answer.getKey());
                if (best == null || e.total() < best.total()) {
                    best = e;
                }
            }
        }
        return best;
    }

    private Map<String, Rotation> answers(Crystal crystal) {
        Map<String, Rotation> answers = new LinkedHashMap<>();
        answers.put("truth", rotation());
        if (number("eq180") == 1) {
            Rotation half = Rotation.ofAxisAngle(crystal.lattice().vector(zone()), Math.PI);
            answers.put("half turn", rotation().after(half));
        }
        for (String alternative : row.get("alternatives").split(";")) {
            String[] parts = alternative.split("\\|");
            if (parts.length == 5 && parts[1].matches("exact|near|twin")) {
                String[] q = parts[4].trim().split(" ");
                answers.put(
                        parts[1] + " [" + parts[0] + "]",
                        Rotation.ofQuaternion(
                                Double.parseDouble(q[0]),
                                Double.parseDouble(q[1]),
                                Double.parseDouble(q[2]),
                                Double.parseDouble(q[3])));
            }
        }
        return answers;
    }
}
