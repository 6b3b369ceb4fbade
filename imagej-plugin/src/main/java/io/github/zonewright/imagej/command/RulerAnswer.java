package io.github.zonewright.imagej.command;

import ij.measure.ResultsTable;
import io.github.zonewright.calibration.Spacing;
import io.github.zonewright.calibration.SpacingList;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.bridge.SpacingTable;
import io.github.zonewright.imagej.session.Figures;
import io.github.zonewright.imagej.session.LengthUnit;
import io.github.zonewright.imagej.session.Ruler;
import io.github.zonewright.imagej.session.SpacingCandidates;
import java.util.List;
import java.util.stream.Collectors;

/** Readings of the ruler in words, numbers and tables. */
public final class RulerAnswer {
    private static final int MOST = 6;

    private RulerAnswer() {}

    /**
     * A reading in one line.
     *
     * @param reading the reading
     * @param ruler the ruler that read it
     * @param forms what {@link #forms} says of it
     * @return d, length, ratio and angle to the one before, candidates
     */
    public static String line(Ruler.Reading reading, Ruler ruler, String forms) {
        Spacing spacing = reading.spacing();
        int order = reading.point().order();
        StringBuilder line = new StringBuilder();
        if (ruler.scale().isPresent()) {
            line.append("d ").append(ruler.text(spacing)).append("; ");
        }
        line.append(Figures.of(spacing.length(), " px"));
        if (order > 1) {
            line.append(" for one of ").append(order).append(" orders");
        }
        reading.relation()
                .ifPresent(r -> line.append("; to the one before: ratio ")
                        .append(Figures.of(r.ratio(), ""))
                        .append(", angle ")
                        .append(Figures.degrees(r.angle())));
        return line + (forms.isEmpty() ? "." : "; " + forms + ".");
    }

    /**
     * The {hkl} that a reading may be.
     *
     * @param reading the reading
     * @param ruler the ruler that read it
     * @param candidates lists the spacings
     * @param crystals the crystals at hand
     * @param tolerancePercent how far off a spacing may be, in %
     * @return the nearest few; empty without a scale or crystals; "none" where none is within the tolerance
     */
    public static String forms(
            Ruler.Reading reading,
            Ruler ruler,
            SpacingCandidates candidates,
            List<Crystal> crystals,
            double tolerancePercent) {
        if (ruler.scale().isEmpty() || crystals.isEmpty()) {
            return "";
        }
        double d = reading.spacing().d().value();
        List<SpacingList.Candidate> within = candidates.of(crystals, d, tolerancePercent);
        String few = within.stream()
                .limit(MOST)
                .map(c -> SpacingCandidates.text(c, d, crystals.size() > 1))
                .collect(Collectors.joining(", "));
        if (within.size() > MOST) {
            return few + " and " + (within.size() - MOST) + " more";
        }
        return few.isEmpty() ? "no {hkl} within " + Figures.percent(tolerancePercent) : few;
    }

    /**
     * Readings as an ImageJ table.
     *
     * @param readings the readings
     * @param ruler the ruler that read them
     * @param forms what {@link #forms} says of each
     * @return the table
     */
    public static ResultsTable table(List<Ruler.Reading> readings, Ruler ruler, List<String> forms) {
        LengthUnit unit = LengthUnit.last();
        List<SpacingTable.Row> rows = new java.util.ArrayList<>();
        for (int i = 0; i < readings.size(); i++) {
            Spacing spacing = readings.get(i).spacing();
            rows.add(new SpacingTable.Row(
                    readings.get(i).point().order(),
                    spacing.length(),
                    ruler.scale().map(s -> spacing.d().times(unit.of(1))),
                    readings.get(i).relation().map(Spacing.Relation::ratio),
                    readings.get(i).relation().map(r -> r.angle().times(Math.toDegrees(1))),
                    forms.get(i)));
        }
        return SpacingTable.of(rows, unit.label());
    }
}
