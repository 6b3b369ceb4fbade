package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.document.FitHandling;
import io.github.zonewright.document.ImageReference;
import io.github.zonewright.imagej.overlay.ShownMarks;
import io.github.zonewright.indexing.Solution;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.stream.Collectors;

/** A sitting as the record of a fit, and back. */
public final class SittingRecord {
    /** Among the marks that are shown: the indices beside the spots. */
    private static final String INDICES = "indices";

    private SittingRecord() {}

    /** The record of what an image shows, if it shows a pattern; the reference says which image it is. */
    static Optional<FitDocument> of(Sitting sitting, ImagePlus image, ImageReference reference) {
        return sitting.chosen()
                .map(solution -> of(solution, sitting, image, reference))
                .or(() -> sitting.placement()
                        .map(FitDocument::of)
                        .map(document -> handled(document, sitting, image, reference)));
    }

    /** The record of a solution; what was found beside it goes along if it is the one that the image shows. */
    static FitDocument of(Solution solution, Sitting sitting, ImagePlus image, ImageReference reference) {
        FitDocument document = handled(FitDocument.of(solution), sitting, image, reference);
        return sitting.chosen().filter(solution::equals).isPresent()
                ? document.withFindings(sitting.findings().kept())
                : document;
    }

    private static FitDocument handled(
            FitDocument document, Sitting sitting, ImagePlus image, ImageReference reference) {
        Measurement measurement = sitting.measurement();
        Set<String> shown = ShownMarks.of(image).stream()
                .map(m -> m.name().toLowerCase(Locale.ROOT))
                .collect(Collectors.toCollection(HashSet::new));
        if (sitting.labelled()) {
            shown.add(INDICES);
        }
        return document.withImage(reference)
                .withHandling(new FitHandling(
                        OptionalDouble.of(sitting.thickness()),
                        measurement.how().said(),
                        measurement.how().hidden(),
                        measurement.edits(),
                        shown));
    }

    /**
     * A sitting that is to be measured as a record says, and that shows its pattern with its thickness and indices.
     *
     * @param before what was known of the image
     * @param record the record
     * @return the sitting, without the record's pattern
     */
    public static Sitting opened(Sitting before, FitDocument record) {
        FitHandling set = record.handling();
        Measurement.How how = before.measurement().how();
        Measurement.How as = how.withDarkSpots(set.darkSpots().or(how::said))
                .withHidden(set.hidden().or(how::hidden));
        boolean anew = set.darkSpots().isPresent()
                || set.hidden().isPresent()
                || !set.edits().isEmpty();
        Sitting measured = anew ? before.withMeasurement(before.measurement().asBefore(as, set.edits())) : before;
        return measured.withThickness(set.thickness().orElse(before.thickness()))
                .withLabels(before.labelled() || set.shown().contains(INDICES));
    }

    /**
     * A sitting with the solution of a record, those behind it, and what was found beside it.
     *
     * @param measured the sitting before
     * @param record the record
     * @param others the solutions behind the record's own
     * @return the sitting; with the record's pattern where it has no solution
     */
    public static Sitting found(Sitting measured, FitDocument record, List<Solution> others) {
        return record.solution()
                .map(one -> measured.withKept(one, others))
                .map(s -> s.withFindings(s.findings().withKept(record.findings())))
                .orElseGet(() -> measured.withPlacement(record.placement()));
    }

    /**
     * The marks that a record tells of.
     *
     * @param record the record
     * @return the marks; empty where it says nothing of what a person set
     */
    public static Optional<Set<ShownMarks>> marks(FitDocument record) {
        return Optional.of(record.handling())
                .filter(set -> !set.equals(FitHandling.NONE))
                .map(set -> ShownMarks.named(set.shown().stream()
                        .map(code -> code.toUpperCase(Locale.ROOT))
                        .collect(Collectors.toSet())));
    }
}
