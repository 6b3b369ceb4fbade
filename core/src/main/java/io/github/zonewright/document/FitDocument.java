package io.github.zonewright.document;

import io.github.zonewright.cif.CifFile;
import io.github.zonewright.cif.CifValue;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.indexing.Grain;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.pattern.Placement;
import java.io.IOException;
import java.nio.file.Path;
import java.time.OffsetDateTime;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * A fit to be kept: the pattern laid over an image, and, where one was found, the solution behind it.
 *
 * <p>Its file is a CIF; the package's description lists the items. The record is self-contained (cell, space group and
 * sites stand in it), and what is read back equals what was written in every bit, so the answer and the overlay are the
 * same.
 *
 * <p><b>Known limits.</b> One record to a file; of several, the first is read. Sites of the crystal that share a label get
 * numbered ones, as the key of a loop must be.
 *
 * @param placement crystal, beam, zone axis, rotation, lean and camera
 * @param solution the solution behind the placement; empty when the pattern was only laid there
 * @param image the image it was laid over, if known
 * @param created when the record was made, if the caller says so
 * @param software name and version of the software that made it; empty when not known
 * @param findings further crystals, and what tells the fit from another answer
 * @param handling what a person set by hand for the image
 */
public record FitDocument(
        Placement placement,
        Optional<Solution> solution,
        Optional<ImageReference> image,
        Optional<OffsetDateTime> created,
        String software,
        FitFindings findings,
        FitHandling handling) {

    /**
     * Checks that the parts are of one piece.
     *
     * @throws IllegalArgumentException if the solution's placement is another one, if something was found beside a solution
     *     and there is none, or if the hidden area is not of the image's frame
     */
    public FitDocument {
        solution.map(Solution::placement).filter(own -> !own.equals(placement)).ifPresent(own -> {
            throw new IllegalArgumentException(
                    "placement of the record: " + placement + ", expected the solution's: " + own);
        });
        if (solution.isEmpty() && !findings.equals(FitFindings.NONE)) {
            throw new IllegalArgumentException("findings of the record: there are some, expected a solution with them");
        }
        Optional<ImageReference> of = image;
        handling.hidden()
                .filter(mask -> of.filter(i -> i.width() == mask.width() && i.height() == mask.height())
                        .isEmpty())
                .ifPresent(mask -> {
                    throw new IllegalArgumentException("frame of the hidden area: " + mask.width() + " × "
                            + mask.height() + " px, expected that of the record's image, "
                            + of.map(i -> i.width() + " × " + i.height() + " px")
                                    .orElse("of which nothing is said"));
                });
    }

    /**
     * A record of a fit alone.
     *
     * @param placement crystal, beam, zone axis, rotation, lean and camera
     * @param solution the solution behind the placement; empty when the pattern was only laid there
     * @param image the image it was laid over, if known
     * @param created when the record was made, if the caller says so
     * @param software name and version of the software that made it; empty when not known
     * @throws IllegalArgumentException if the solution's placement is another one
     */
    public FitDocument(
            Placement placement,
            Optional<Solution> solution,
            Optional<ImageReference> image,
            Optional<OffsetDateTime> created,
            String software) {
        this(placement, solution, image, created, software, FitFindings.NONE, FitHandling.NONE);
    }

    /**
     * The record of a solution.
     *
     * @param solution the solution
     * @return the record, of no image, time and software yet
     */
    public static FitDocument of(Solution solution) {
        return new FitDocument(solution.placement(), Optional.of(solution), Optional.empty(), Optional.empty(), "");
    }

    /**
     * The record of a pattern laid by hand, with no fit behind it.
     *
     * @param placement the placement
     * @return the record, of no image, time and software yet
     */
    public static FitDocument of(Placement placement) {
        return new FitDocument(placement, Optional.empty(), Optional.empty(), Optional.empty(), "");
    }

    /**
     * The same record of an image.
     *
     * @param reference the image
     * @return the record
     */
    public FitDocument withImage(ImageReference reference) {
        return new FitDocument(placement, solution, Optional.of(reference), created, software, findings, handling);
    }

    /**
     * The same record, dated.
     *
     * @param time when it was made
     * @return the record
     */
    public FitDocument createdAt(OffsetDateTime time) {
        return new FitDocument(placement, solution, image, Optional.of(time), software, findings, handling);
    }

    /**
     * The same record, with its maker.
     *
     * @param nameAndVersion name and version of the software
     * @return the record
     */
    public FitDocument createdBy(String nameAndVersion) {
        return new FitDocument(placement, solution, image, created, nameAndVersion, findings, handling);
    }

    /**
     * The same record with what was found out beside the fit.
     *
     * @param found further crystals, and what tells the fit from another answer
     * @return the record
     * @throws IllegalArgumentException if there is no solution that it could be found beside
     */
    public FitDocument withFindings(FitFindings found) {
        return new FitDocument(placement, solution, image, created, software, found, handling);
    }

    /**
     * The same record with what a person set by hand.
     *
     * @param set how the image is measured and shown
     * @return the record
     * @throws IllegalArgumentException if the hidden area is not of the image's frame
     */
    public FitDocument withHandling(FitHandling set) {
        return new FitDocument(placement, solution, image, created, software, findings, set);
    }

    /**
     * What the reader of the record must bear in mind.
     *
     * @return the cautions
     */
    public List<Caution> cautions() {
        List<Caution> cautions = new ArrayList<>(List.of(Caution.HAND_ASSUMED));
        if (solution.flatMap(Solution::halfTurn).isPresent()) {
            cautions.add(Caution.HALF_TURN);
        }
        return List.copyOf(cautions);
    }

    /**
     * The record as a CIF.
     *
     * @return the file
     * @throws IllegalArgumentException if a text has a character that a CIF cannot hold
     */
    public CifFile toCif() {
        return toCif(List.of());
    }

    /**
     * The record as a CIF, and behind it other solutions of the same search, so that a reader can tell how sure it is. The
     * further crystals of the findings stand behind them.
     *
     * @param others the other solutions, best first
     * @return the file
     * @throws IllegalArgumentException if a text has a character that a CIF cannot hold
     */
    public CifFile toCif(List<Solution> others) {
        return FitWriter.file(this, others);
    }

    /**
     * Writes the record, whole or not at all.
     *
     * @param path the file
     * @throws IOException if it cannot be written; an older file is then as it was
     * @throws IllegalArgumentException if a text has a character that a CIF cannot hold
     */
    public void write(Path path) throws IOException {
        toCif().write(path);
    }

    /**
     * Reads a record from its file.
     *
     * @param path the file
     * @return the record
     * @throws IOException if the file cannot be read
     * @throws io.github.zonewright.cif.CifException if it is no CIF, no record of a fit or one of another version, or an
     *     item is missing or unfit; it names item and line
     * @throws io.github.zonewright.crystal.CrystalCifException if the crystal cannot be used; it names item and line
     */
    public static FitDocument read(Path path) throws IOException {
        return read(CifFile.read(path));
    }

    /**
     * Reads a record.
     *
     * @param file the file
     * @return the record
     * @throws io.github.zonewright.cif.CifException if there is no record of a fit in it or one of another version, or an
     *     item is missing or unfit; it names item and line
     * @throws io.github.zonewright.crystal.CrystalCifException if the crystal cannot be used; it names item and line
     */
    public static FitDocument read(CifFile file) {
        FitDocument fit = new FitReader(RecordBlock.find(file, FitWriter.TYPE, FitWriter.VERSION)).document();
        List<Grain> grains = RecordBlock.all(file, FitWriter.GRAIN, FitWriter.VERSION).stream()
                .map(block -> new FitReader(block, Optional.of(fit.placement().crystal())).grain(fit.placement()))
                .toList();
        return grains.isEmpty()
                ? fit
                : fit.withFindings(new FitFindings(grains, fit.findings().apart()));
    }

    /**
     * Reads the other solutions that stand behind a record.
     *
     * @param file the file
     * @return the solutions in the order in which they were written; none in a file without any
     * @throws io.github.zonewright.cif.CifException as {@link #read(CifFile)} does
     * @throws io.github.zonewright.crystal.CrystalCifException as {@link #read(CifFile)} does
     */
    public static List<Solution> others(CifFile file) {
        Optional<Crystal> crystal = Optional.of(read(file).placement().crystal());
        return RecordBlock.all(file, FitWriter.ALTERNATIVE, FitWriter.VERSION).stream()
                .flatMap(block -> new FitReader(block, crystal).document().solution().stream())
                .toList();
    }

    /**
     * Whether there is a record of a fit in a file, readable or not.
     *
     * @param file the file
     * @return true if one of its blocks says that it is one
     */
    public static boolean isIn(CifFile file) {
        return file.blocks().stream()
                .anyMatch(block -> block.value(RecordBlock.TYPE_ITEM)
                        .map(CifValue::text)
                        .filter(FitWriter.TYPE::equals)
                        .isPresent());
    }
}
