package io.github.zonewright.document;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.ReciprocalLattice;
import java.util.Comparator;
import java.util.List;

/** The explained spots of largest spacing as tables side by side, so many as a page has room for; beside them the residuals. */
final class SpotColumns {
    private static final int COLUMNS = 3;
    private static final int ROWS = 12;

    private final Solution solution;
    private final ReciprocalLattice reciprocal;

    SpotColumns(Solution solution) {
        this.solution = solution;
        this.reciprocal = solution.placement().crystal().lattice().reciprocal();
    }

    void write(Markup out) {
        List<SpotMatch> all = solution.matches().stream()
                .sorted(Comparator.comparingDouble((SpotMatch m) -> -reciprocal.spacing(m.hkl()))
                        .thenComparing(SpotMatch::hkl, Comparator.reverseOrder()))
                .toList();
        int shown = Math.min(all.size(), ROWS * COLUMNS);
        int rows = (shown + COLUMNS - 1) / COLUMNS;
        out.open("div", "class", "spots");
        for (int from = 0; from < shown; from += rows) {
            int to = Math.min(shown, from + rows);
            out.open("table").element("caption", "Spots " + (from + 1) + " to " + to + " of " + all.size());
            out.open("thead").open("tr");
            for (String name : List.of("h k l", "d (Å)", "d measured\u00a0(Å)", "residual (px)")) {
                out.element("th", name, "scope", "col");
            }
            out.close().close().open("tbody").line();
            all.subList(from, to).forEach(match -> row(match, out));
            out.close().close();
        }
        ResidualFigure.write(solution, out);
        out.close();
    }

    private void row(SpotMatch match, Markup out) {
        Hkl hkl = match.hkl();
        out.open("tr")
                .open("th", "scope", "row")
                .indices(hkl.h(), hkl.k(), hkl.l())
                .close();
        out.element("td", Figures.plain(reciprocal.spacing(hkl), 3));
        out.element("td", Figures.plain(measuredSpacing(match), 3));
        out.element("td", Figures.plain(match.residual(), 2)).close().line();
    }

    /** 1/|g| of the place on the Ewald sphere that the measured spot comes from. */
    private double measuredSpacing(SpotMatch match) {
        double wavelength = solution.placement().beam().wavelength();
        Vector2 across =
                solution.placement().camera().toReciprocal(match.measured().position(), wavelength);
        double k = 1 / wavelength;
        double along = k - Math.sqrt(Math.max(0, k * k - across.dot(across)));
        return 1 / Math.hypot(across.norm(), along);
    }
}
