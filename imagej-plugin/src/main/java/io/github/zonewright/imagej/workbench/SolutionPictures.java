package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.overlay.SolutionPicture;
import io.github.zonewright.indexing.Solution;
import java.awt.Image;
import java.util.IdentityHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import javax.swing.Icon;
import javax.swing.ImageIcon;

/**
 * The small pictures of solutions, drawn when they are first looked at, one after the other and away from the event thread, and
 * then kept as long as the solution is shown.
 */
final class SolutionPictures {
    static final int SIDE = 86;

    private final Map<Solution, Icon> drawn = new IdentityHashMap<>();
    private final Runnable onDrawn;
    private Optional<Background<Image>> drawing = Optional.empty();
    private double thickness;

    /** Tells, on the event thread, whenever a picture is drawn; then it is to be asked for again, and so are others. */
    SolutionPictures(Runnable onDrawn) {
        this.onDrawn = onDrawn;
    }

    /** Forgets the pictures of other solutions, and all where the foil is of another thickness. */
    void keep(List<Solution> solutions, double foil) {
        if (foil != thickness) {
            drawn.clear();
            thickness = foil;
        }
        drawn.keySet().removeIf(old -> solutions.stream().noneMatch(s -> s == old));
    }

    /** The picture; empty while it is being drawn. */
    Optional<Icon> of(Solution solution) {
        Optional<Icon> known = Optional.ofNullable(drawn.get(solution));
        if (known.isEmpty() && drawing.isEmpty()) {
            double foil = thickness;
            drawing = Optional.of(new Background<>(
                    (progress, stopped) -> SolutionPicture.of(solution, foil, SIDE),
                    part -> {},
                    picture -> done(solution, new ImageIcon(picture)),
                    failure -> done(solution, new ImageIcon())));
            drawing.get().execute();
        }
        return known;
    }

    private void done(Solution solution, Icon picture) {
        drawing = Optional.empty();
        drawn.put(solution, picture);
        onDrawn.run();
    }
}
