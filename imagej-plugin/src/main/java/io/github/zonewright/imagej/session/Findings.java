package io.github.zonewright.imagej.session;

import io.github.zonewright.document.FitFindings;
import io.github.zonewright.document.ToldApart;
import io.github.zonewright.imagej.overlay.ExtraMark;
import io.github.zonewright.imagej.overlay.PatternView;
import io.github.zonewright.imagej.overlay.ViewMaker;
import io.github.zonewright.indexing.Grain;
import io.github.zonewright.indexing.RowAnswer;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.indexing.SpotMatch;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.stream.Collectors;

/**
 * What was found out beside the solutions. What belongs to the solution shown goes when another one, or none, is shown.
 *
 * @param row what the spots tell when they are a single row
 * @param grains further crystals in what the solution shown leaves over
 * @param apart what tells the solution shown from another
 */
public record Findings(Optional<RowAnswer> row, List<Grain> grains, Optional<ToldApart> apart) {
    /** Nothing. */
    public static final Findings NONE = new Findings(Optional.empty(), List.of(), Optional.empty());

    /** Spots to look for that are marked. */
    private static final int MOST_TELLING = 3;

    /** Copies the list. */
    public Findings {
        grains = List.copyOf(grains);
    }

    static Findings of(SearchResult result) {
        return new Findings(result.row(), List.of(), Optional.empty());
    }

    /** Without what belongs to the solution shown. */
    Findings ofSearch() {
        return grains.isEmpty() && apart.isEmpty() ? this : new Findings(row, List.of(), Optional.empty());
    }

    /**
     * With further crystals.
     *
     * @param found the crystals, the surest first
     * @return the changed findings
     */
    public Findings withGrains(List<Grain> found) {
        return new Findings(row, found, apart);
    }

    /**
     * With what tells the solution shown from another.
     *
     * @param told what was found
     * @return the changed findings
     */
    public Findings withApart(ToldApart told) {
        return new Findings(row, grains, Optional.of(told));
    }

    /** What of this a record keeps. */
    FitFindings kept() {
        return new FitFindings(grains, apart);
    }

    /** With what a record kept. */
    Findings withKept(FitFindings kept) {
        return new Findings(row, kept.grains(), kept.apart());
    }

    /** Draws further crystals and spots to look for over a view, unless it shows what was measured alone. */
    PatternView over(PatternView view, ViewMaker views, boolean measuredAlone, double thickness) {
        if (measuredAlone || grains.isEmpty() && apart.isEmpty()) {
            return view;
        }
        List<ExtraMark> marks = new ArrayList<>();
        for (int i = 0; i < grains.size(); i++) {
            marks.addAll(views.ofFurther(grains.get(i).solution().placement(), i, thickness));
        }
        apart.stream()
                .flatMap(told -> told.spots().stream())
                .filter(s -> views.isInside(s.place()))
                .limit(MOST_TELLING)
                .forEach(s -> marks.add(ExtraMark.telling(s.place(), s.ofFirst() ? 1 : 2)));
        Set<MeasuredSpot> explained = grains.stream()
                .flatMap(g -> g.solution().matches().stream())
                .map(SpotMatch::measured)
                .collect(Collectors.toSet());
        return view.withFurther(marks, explained);
    }
}
