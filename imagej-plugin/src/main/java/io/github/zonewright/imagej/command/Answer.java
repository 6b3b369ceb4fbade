package io.github.zonewright.imagej.command;

import io.github.zonewright.imagej.overlay.IndexLabel;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.util.Locale;

/** Solutions in words and numbers for a person: degrees, px, px·Å. */
public final class Answer {
    private Answer() {}

    /**
     * A solution in one line.
     *
     * @param solution the solution
     * @return crystal, zone axis, rotation, spots explained, residual
     */
    public static String line(Solution solution) {
        Placement placement = solution.placement();
        ZoneSetting setting = placement.setting();
        return String.format(
                Locale.ROOT,
                "%s, zone axis %s, rotation %.2f° (%s), %d of %d spots explained, residual %.2f px",
                placement.crystal().name(),
                IndexLabel.of(setting.zone()),
                Math.toDegrees(setting.rotation()),
                IndexLabel.of(setting.reference()),
                solution.matches().size(),
                measured(solution),
                solution.rmsResidual());
    }

    /**
     * How many spots were measured.
     *
     * @param solution a solution
     * @return explained and unexplained ones
     */
    public static int measured(Solution solution) {
        return solution.matches().size() + solution.unexplained().size();
    }
}
