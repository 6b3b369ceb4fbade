package io.github.zonewright.imagej.command;

import io.github.zonewright.imagej.overlay.ExtraMark;
import io.github.zonewright.imagej.overlay.PatternView;
import io.github.zonewright.imagej.overlay.ViewMaker;
import io.github.zonewright.indexing.Discrimination;
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
 * @param telling spots that tell the solution shown from another
 */
public record Findings(Optional<RowAnswer> row, List<Grain> grains, List<Discrimination.TellingSpot> telling) {
    /** Nothing. */
    public static final Findings NONE = new Findings(Optional.empty(), List.of(), List.of());

    /** Spots to look for that are marked. */
    private static final int MOST_TELLING = 3;

    /** Copies the lists. */
    public Findings {
        grains = List.copyOf(grains);
        telling = List.copyOf(telling);
    }

    static Findings of(SearchResult result) {
        return new Findings(result.row(), List.of(), List.of());
    }

    /** Without what belongs to the solution shown. */
    Findings ofSearch() {
        return grains.isEmpty() && telling.isEmpty() ? this : new Findings(row, List.of(), List.of());
    }

    /**
     * With further crystals.
     *
     * @param found the crystals, the surest first
     * @return the changed findings
     */
    public Findings withGrains(List<Grain> found) {
        return new Findings(row, found, telling);
    }

    /**
     * With spots to look for.
     *
     * @param spots the spots, the most telling first
     * @return the changed findings
     */
    public Findings withTelling(List<Discrimination.TellingSpot> spots) {
        return new Findings(row, grains, spots);
    }

    /** Draws further crystals and spots to look for over a view, unless it shows what was measured alone. */
    PatternView over(PatternView view, ViewMaker views, boolean measuredAlone, double thickness) {
        if (measuredAlone || grains.isEmpty() && telling.isEmpty()) {
            return view;
        }
        List<ExtraMark> marks = new ArrayList<>();
        for (int i = 0; i < grains.size(); i++) {
            marks.addAll(views.ofFurther(grains.get(i).solution().placement(), i, thickness));
        }
        telling.stream()
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
