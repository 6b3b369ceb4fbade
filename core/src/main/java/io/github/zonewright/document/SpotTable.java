package io.github.zonewright.document;

import io.github.zonewright.cif.AtomicFile;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.ReciprocalLattice;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collection;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;

/**
 * The spots of a pattern as a table, a row to a spot: explained ones, then unexplained ones, then those predicted but not
 * measured.
 *
 * <p>As text it is CSV as of RFC 4180: a header, commas, CRLF at the end of every line, fields in double quotes where they
 * need it; to be stored as UTF-8. Numbers have a decimal point and all their digits; a field is empty where there is
 * nothing to tell. The columns:
 *
 * <table>
 * <caption>Columns</caption>
 * <tr><td>kind</td><td>explained, unexplained or predicted</td></tr>
 * <tr><td>h, k, l</td><td>the reflection</td></tr>
 * <tr><td>d (Å)</td><td>its spacing in the crystal</td></tr>
 * <tr><td>measured x (px), measured y (px), measured su (px)</td><td>measured place, and the standard uncertainty of either
 *     coordinate</td></tr>
 * <tr><td>computed x (px), computed y (px)</td><td>computed place</td></tr>
 * <tr><td>residual (px)</td><td>the distance between the two</td></tr>
 * <tr><td>measured intensity (grey values), signal to noise, saturated</td><td>of the measured spot</td></tr>
 * <tr><td>excitation error (1/Å), structure factor (Å), computed intensity</td><td>of a predicted spot: s, |F|, and the
 *     share of the incident beam</td></tr>
 * </table>
 *
 * <p>Known limit: an explained spot shows what the theory says of it only where its reflection is among the predicted
 * spots given.
 */
public final class SpotTable {

    private static final List<String> COLUMNS = List.of(
            "kind",
            "h",
            "k",
            "l",
            "d (Å)",
            "measured x (px)",
            "measured y (px)",
            "measured su (px)",
            "computed x (px)",
            "computed y (px)",
            "residual (px)",
            "measured intensity (grey values)",
            "signal to noise",
            "saturated",
            "excitation error (1/Å)",
            "structure factor (Å)",
            "computed intensity");

    private final List<List<String>> rows;

    private SpotTable(List<List<String>> rows) {
        this.rows = List.copyOf(rows);
    }

    /**
     * The measured spots of a solution.
     *
     * @param solution the solution
     * @return the table, without predicted spots
     */
    public static SpotTable of(Solution solution) {
        return of(solution, List.of());
    }

    /**
     * The measured spots of a solution and the predicted ones.
     *
     * @param solution the solution
     * @param predicted the spots of its computed pattern on the image
     * @return the table; a predicted spot that was measured has one row, as an explained one
     */
    public static SpotTable of(Solution solution, List<PlacedSpot> predicted) {
        ReciprocalLattice reciprocal = solution.placement().crystal().lattice().reciprocal();
        List<List<String>> rows = new ArrayList<>();
        Map<Hkl, PlacedSpot> unmeasured = new LinkedHashMap<>();
        predicted.forEach(p -> unmeasured.putIfAbsent(p.spot().hkl(), p));
        for (SpotMatch match : solution.matches()) {
            PlacedSpot theory = unmeasured.remove(match.hkl());
            rows.add(row(List.of(
                    List.of("explained"),
                    indices(match.hkl(), reciprocal),
                    place(match.measured()),
                    point(match.computed()),
                    numbers(match.residual()),
                    strength(match.measured()),
                    theory == null ? blank(3) : theory(theory))));
        }
        for (MeasuredSpot spot : solution.unexplained()) {
            rows.add(row(List.of(List.of("unexplained"), blank(4), place(spot), blank(3), strength(spot), blank(3))));
        }
        addPredicted(rows, unmeasured.values(), reciprocal);
        return new SpotTable(rows);
    }

    /**
     * The predicted spots of a placement that no fit stands behind.
     *
     * @param placement the placement
     * @param predicted the spots of its computed pattern on the image
     * @return the table
     */
    public static SpotTable of(Placement placement, List<PlacedSpot> predicted) {
        List<List<String>> rows = new ArrayList<>();
        addPredicted(rows, predicted, placement.crystal().lattice().reciprocal());
        return new SpotTable(rows);
    }

    private static void addPredicted(
            List<List<String>> rows, Collection<PlacedSpot> predicted, ReciprocalLattice reciprocal) {
        for (PlacedSpot spot : predicted) {
            rows.add(row(List.of(
                    List.of("predicted"),
                    indices(spot.spot().hkl(), reciprocal),
                    blank(3),
                    point(spot.position()),
                    blank(4),
                    theory(spot))));
        }
    }

    /**
     * The names of the columns, with units in parentheses.
     *
     * @return the header
     */
    public static List<String> columns() {
        return COLUMNS;
    }

    /**
     * The fields, as they stand in the CSV but without quotes.
     *
     * @return the rows, each with a field for every column, empty where there is nothing to tell
     */
    public List<List<String>> rows() {
        return rows;
    }

    /**
     * The table as CSV.
     *
     * @return the text, to be stored as UTF-8
     */
    public String toCsv() {
        StringBuilder csv = new StringBuilder();
        append(csv, COLUMNS);
        rows.forEach(row -> append(csv, row));
        return csv.toString();
    }

    /**
     * Writes the CSV in UTF-8, whole or not at all.
     *
     * @param path the file
     * @throws IOException if it cannot be written; an older file is then as it was
     */
    public void write(Path path) throws IOException {
        AtomicFile.write(path, toCsv().getBytes(StandardCharsets.UTF_8));
    }

    private static void append(StringBuilder csv, List<String> fields) {
        csv.append(fields.stream().map(SpotTable::field).collect(Collectors.joining(",")))
                .append("\r\n");
    }

    /** A field with the quotes it needs. */
    static String field(String text) {
        boolean plain = text.chars().noneMatch(c -> c == '"' || c == ',' || c == '\r' || c == '\n');
        return plain ? text : '"' + text.replace("\"", "\"\"") + '"';
    }

    private static List<String> row(List<List<String>> parts) {
        return parts.stream().flatMap(List::stream).toList();
    }

    private static List<String> indices(Hkl hkl, ReciprocalLattice reciprocal) {
        return List.of(
                Integer.toString(hkl.h()),
                Integer.toString(hkl.k()),
                Integer.toString(hkl.l()),
                hkl.isZero() ? "" : number(reciprocal.spacing(hkl)));
    }

    private static List<String> place(MeasuredSpot spot) {
        return numbers(spot.position().x(), spot.position().y(), spot.positionError());
    }

    private static List<String> point(PixelPoint point) {
        return numbers(point.x(), point.y());
    }

    private static List<String> strength(MeasuredSpot spot) {
        return List.of(number(spot.intensity()), number(spot.signalToNoise()), spot.saturated() ? "yes" : "no");
    }

    private static List<String> theory(PlacedSpot spot) {
        return numbers(
                spot.spot().excitationError(),
                spot.spot().amplitude(),
                spot.spot().intensity());
    }

    private static List<String> numbers(double... numbers) {
        return Arrays.stream(numbers).mapToObj(SpotTable::number).toList();
    }

    private static String number(double number) {
        return Double.isFinite(number) ? Double.toString(number) : "";
    }

    private static List<String> blank(int fields) {
        return Collections.nCopies(fields, "");
    }
}
