package io.github.zonewright.document;

import io.github.zonewright.cif.AtomicFile;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.Verdict;
import io.github.zonewright.lattice.Hkl;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;

/**
 * A fit on one page for people: the marked pattern, instrument, crystal, solution with its uncertainties, the spots, what
 * else would explain them, cautions, and where it all came from.
 *
 * <p>It is one file of HTML in UTF-8, well-formed as XML too, which fetches nothing and runs nothing. Printed, it fills one
 * page of A4 or Letter; shapes and words carry all that colours do. Whatever it takes from files stands in it as text.
 *
 * <p>Known limit: a page holds 36 spots, three other solutions and two notices of the crystal; of more it says how many there are.
 */
public final class FitReport {
    private final FitDocument fit;
    private final byte[] picture;
    private final List<Solution> solutions;
    private final Optional<List<Hkl>> missing;
    private final String calibration;

    private FitReport(
            FitDocument fit,
            byte[] picture,
            List<Solution> solutions,
            Optional<List<Hkl>> missing,
            String calibration) {
        this.fit = fit;
        this.picture = picture;
        this.solutions = solutions;
        this.missing = missing;
        this.calibration = calibration;
    }

    /**
     * The report of a record.
     *
     * @param fit the record
     * @return the report, without picture, other solutions, missing spots and calibration
     */
    public static FitReport of(FitDocument fit) {
        return new FitReport(fit, new byte[0], List.of(), Optional.empty(), "");
    }

    /**
     * The same with a picture.
     *
     * @param png the pattern with its marks, as the bytes of a PNG file; copied
     * @return the report
     * @throws IllegalArgumentException if these are not the bytes of a PNG file
     */
    public FitReport withPicture(byte[] png) {
        byte[] signature = {(byte) 0x89, 'P', 'N', 'G', '\r', '\n', 0x1a, '\n'};
        if (png.length < signature.length || !java.util.Arrays.equals(signature, 0, 8, png, 0, 8)) {
            throw new IllegalArgumentException(
                    "picture of the report: " + png.length + " bytes, expected those of a PNG file");
        }
        return new FitReport(fit, png.clone(), solutions, missing, calibration);
    }

    /**
     * The same with all that the search found.
     *
     * @param found the solutions, best first, that of the record among them
     * @return the report, with a verdict and the others as alternatives
     */
    public FitReport withSolutions(List<Solution> found) {
        return new FitReport(fit, picture, List.copyOf(found), missing, calibration);
    }

    /**
     * The same with the reflections that ought to be seen and are not.
     *
     * @param absent the reflections; none is an answer too
     * @return the report
     */
    public FitReport withMissing(List<Hkl> absent) {
        return new FitReport(fit, picture, solutions, Optional.of(List.copyOf(absent)), calibration);
    }

    /**
     * The same with the calibration that the scale was taken from.
     *
     * @param name its name; blank for none
     * @return the report
     */
    public FitReport withCalibration(String name) {
        return new FitReport(fit, picture, solutions, missing, name.strip());
    }

    FitDocument fit() {
        return fit;
    }

    byte[] picture() {
        return picture;
    }

    Optional<List<Hkl>> missing() {
        return missing;
    }

    String calibration() {
        return calibration;
    }

    /** The solutions other than the record's, best first. */
    List<Solution> others() {
        return solutions.stream()
                .filter(s -> !s.placement().equals(fit.placement()))
                .toList();
    }

    Optional<Verdict> verdict() {
        if (solutions.isEmpty()) {
            return Optional.empty();
        }
        boolean best = solutions.get(0).placement().equals(fit.placement());
        return Optional.of(Verdict.of(
                new SearchResult(solutions, ""), best ? fit.findings().grains() : List.of()));
    }

    /**
     * The page.
     *
     * @return the text of the file, to be stored as UTF-8
     */
    public String toHtml() {
        return new ReportPage(this).html();
    }

    /**
     * Writes the page, whole or not at all.
     *
     * @param path the file
     * @throws IOException if it cannot be written; an older file is then as it was
     */
    public void write(Path path) throws IOException {
        AtomicFile.write(path, toHtml().getBytes(StandardCharsets.UTF_8));
    }
}
