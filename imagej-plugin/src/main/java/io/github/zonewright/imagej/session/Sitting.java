package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.imagej.overlay.PatternView;
import io.github.zonewright.imagej.overlay.ShownMarks;
import io.github.zonewright.imagej.overlay.ViewMaker;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.Verdict;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.PatternSimulator;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotEdit;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.CopyOnWriteArrayList;
import java.util.function.Consumer;

/**
 * What is known so far about the pattern on one image, or on one slice of a stack. It is kept with the image itself, so
 * that commands, workbench and tool find the same, it follows ImageJ's own undo, and it goes when the image goes.
 *
 * @param measurement the measured spots, and how they are measured
 * @param solutions the solutions of the last search, best first
 * @param chosen the solution whose placement is shown as fitted
 * @param placement the pattern laid over the image
 * @param thickness foil thickness in Å for the computed intensities
 * @param labelled whether spots carry their indices
 * @param findings what else was found out
 */
public record Sitting(
        Measurement measurement,
        List<Solution> solutions,
        Optional<Solution> chosen,
        Optional<Placement> placement,
        double thickness,
        boolean labelled,
        Findings findings) {
    private static final List<Consumer<ImagePlus>> LISTENERS = new CopyOnWriteArrayList<>();
    private static final double SAME_ROTATION = Math.toRadians(1);
    private static final String VIEWS = "zonewright.views";

    /** Nothing is known. */
    public static final Sitting EMPTY = new Sitting(
            Measurement.NONE,
            List.of(),
            Optional.empty(),
            Optional.empty(),
            PatternSimulator.DEFAULT_THICKNESS,
            false,
            Findings.NONE);

    /** Copies the list. */
    public Sitting {
        solutions = List.copyOf(solutions);
    }

    /**
     * What is known about an image's current slice.
     *
     * @param image the image
     * @return the sitting; {@link #EMPTY} for an image new to us
     */
    public static Sitting of(ImagePlus image) {
        return SittingStore.of(image).current(image);
    }

    /**
     * Keeps this with the image and draws it.
     *
     * @param image the image
     */
    public void show(ImagePlus image) {
        SittingStore.of(image).show(image, this, view(image));
        tell(image);
    }

    /**
     * Keeps this with the image and draws it while a drag goes on: the marks carry no record until {@link #show} ends it.
     *
     * @param image the image
     */
    public void sketch(ImagePlus image) {
        SittingStore.of(image).sketch(image, this, view(image));
        tell(image);
    }

    /**
     * Tells the listeners that something else that is kept with an image has changed.
     *
     * @param image the image
     */
    public static void tell(ImagePlus image) {
        LISTENERS.forEach(listener -> listener.accept(image));
    }

    /**
     * Asks to be told whenever a sitting was shown.
     *
     * @param listener is given the image, on the thread that showed it
     */
    public static void addListener(Consumer<ImagePlus> listener) {
        LISTENERS.add(listener);
    }

    /**
     * Ends what {@link #addListener} began.
     *
     * @param listener the listener
     */
    public static void removeListener(Consumer<ImagePlus> listener) {
        LISTENERS.remove(listener);
    }

    /**
     * The measured spots.
     *
     * @return empty before they are measured
     */
    public Optional<MeasuredPattern> measured() {
        return measurement.pattern();
    }

    /**
     * With other measured spots; solutions found from earlier ones go, a pattern laid over the image stays.
     *
     * @param pattern the measured spots
     * @return the changed sitting
     */
    public Sitting withMeasured(MeasuredPattern pattern) {
        return withSpots(measurement.withPattern(pattern));
    }

    /**
     * With the measured spots changed by a person; what goes and stays is the same.
     *
     * @param edit the change
     * @return the changed sitting, its spots drawn from now on
     * @throws IllegalArgumentException if it can't be done; the message says why
     */
    public Sitting withEdited(SpotEdit edit) {
        return withSpots(measurement.withEdit(edit).withShown(true));
    }

    private Sitting withSpots(Measurement other) {
        return new Sitting(other, List.of(), Optional.empty(), placement, thickness, labelled, Findings.NONE);
    }

    /**
     * With another state of the measurement, the spots being the same.
     *
     * @param other the measurement
     * @return the changed sitting
     */
    public Sitting withMeasurement(Measurement other) {
        return new Sitting(other, solutions, chosen, placement, thickness, labelled, findings);
    }

    /**
     * With other solutions, the first of them shown; without any, nothing is laid over the image.
     *
     * @param found the solutions, best first
     * @return the changed sitting
     */
    public Sitting withSolutions(List<Solution> found) {
        Optional<Solution> first = found.stream().findFirst();
        return new Sitting(
                measurement.withShown(false),
                found,
                first,
                first.map(Solution::placement),
                thickness,
                labelled,
                Findings.NONE);
    }

    /**
     * With what a search has found, its best solution shown.
     *
     * @param result the result
     * @return the changed sitting
     */
    public Sitting withResult(SearchResult result) {
        return withSolutions(result.solutions()).withFindings(Findings.of(result));
    }

    /**
     * With other findings.
     *
     * @param other the findings
     * @return the changed sitting
     */
    public Sitting withFindings(Findings other) {
        return new Sitting(measurement, solutions, chosen, placement, thickness, labelled, other);
    }

    /**
     * The solutions other than one of them.
     *
     * @param one the solution
     * @return the others, best first; none when it is none of the solutions
     */
    public List<Solution> others(Solution one) {
        return solutions.contains(one)
                ? solutions.stream().filter(s -> !s.equals(one)).toList()
                : List.of();
    }

    /**
     * With a solution of a record shown, and the others that stood behind it.
     *
     * @param one the solution
     * @param others the others
     * @return the changed sitting, its solutions by falling score
     */
    public Sitting withKept(Solution one, List<Solution> others) {
        List<Solution> all = new ArrayList<>(others);
        all.add(0, one);
        all.sort(Comparator.comparingDouble(Solution::score).reversed());
        return withSolutions(all).withChosen(one);
    }

    /**
     * With a solution shown as fitted.
     *
     * @param solution the solution
     * @return the changed sitting
     */
    public Sitting withChosen(Solution solution) {
        return new Sitting(
                measurement.withShown(false),
                solutions,
                Optional.of(solution),
                Optional.of(solution.placement()),
                thickness,
                labelled,
                findings.ofSearch());
    }

    /**
     * With a refined solution ahead of the others, in place of any that is the same zone of the same crystal
     * turned by less than 1°.
     *
     * @param refined the solution
     * @return the changed sitting
     */
    public Sitting withRefined(Solution refined) {
        List<Solution> all = new ArrayList<>(solutions);
        all.removeIf(s -> s.placement().crystal().equals(refined.placement().crystal())
                && isNear(s.placement().setting(), refined.placement().setting()));
        all.add(0, refined);
        return new Sitting(
                measurement.withShown(false),
                all,
                Optional.of(refined),
                Optional.of(refined.placement()),
                thickness,
                labelled,
                findings.ofSearch());
    }

    /**
     * With a pattern laid by hand.
     *
     * @param laid the pattern
     * @return the changed sitting
     */
    public Sitting withPlacement(Placement laid) {
        Optional<Solution> same = chosen.filter(s -> s.placement().equals(laid));
        return new Sitting(
                measurement.withShown(false),
                solutions,
                same,
                Optional.of(laid),
                thickness,
                labelled,
                findings.ofSearch());
    }

    /**
     * With another foil thickness.
     *
     * @param angstroms thickness in Å
     * @return the changed sitting
     */
    public Sitting withThickness(double angstroms) {
        return new Sitting(measurement, solutions, chosen, placement, angstroms, labelled, findings);
    }

    /**
     * With or without indices beside the spots.
     *
     * @param shown whether they are shown
     * @return the changed sitting
     */
    public Sitting withLabels(boolean shown) {
        return new Sitting(measurement, solutions, chosen, placement, thickness, shown, findings);
    }

    /**
     * How sure the best solution is, with the further crystals in what it leaves over if they were searched.
     *
     * @return the verdict
     */
    public Verdict verdict() {
        boolean best = chosen.isPresent() && solutions.stream().findFirst().equals(chosen);
        return Verdict.of(new SearchResult(solutions, ""), best ? findings.grains() : List.of());
    }

    /**
     * The fit to which a pattern laid by hand goes back.
     *
     * @return the solution of the same zone of the same crystal that is turned least against it, else the best solution
     */
    public Optional<Solution> fit() {
        return placement
                .flatMap(laid -> solutions.stream()
                        .filter(s -> s.placement().crystal().equals(laid.crystal()))
                        .filter(s -> s.placement()
                                .setting()
                                .zone()
                                .equals(laid.setting().zone()))
                        .min(Comparator.comparingDouble(s -> Math.abs(
                                PatternMove.between(laid, s.placement()).turn()))))
                .or(() -> solutions.stream().findFirst());
    }

    private static boolean isNear(ZoneSetting a, ZoneSetting b) {
        return a.zone().equals(b.zone())
                && a.reference().equals(b.reference())
                && Math.abs(Math.IEEEremainder(a.rotation() - b.rotation(), 2 * Math.PI)) < SAME_ROTATION;
    }

    /** What is drawn of it over an image. */
    PatternView view(ImagePlus image) {
        ViewMaker views = views(image);
        PatternView drawn = views.withShown(
                findings.over(pattern(views), views, measurement.shown(), thickness),
                ShownMarks.of(image),
                LengthUnit.last() == LengthUnit.NANOMETRE,
                chosen.map(Solution::matches).orElse(List.of()));
        List<RulerPoint> points = measurement.ruler();
        return points.isEmpty() ? drawn : drawn.withRuler(Ruler.of(image, this).lines(points));
    }

    private PatternView pattern(ViewMaker views) {
        Optional<MeasuredPattern> measured = measured();
        if (placement.isEmpty() || measurement.shown()) {
            return views.ofMeasured(measured, measurement.net());
        }
        if (chosen.isPresent() && measured.isPresent()) {
            return views.ofSolution(chosen.get(), measured.get(), thickness, labelled);
        }
        if (chosen.isPresent()) {
            return views.ofSolution(chosen.get(), thickness, labelled);
        }
        Placement laid = placement.get();
        return fit().filter(f -> f.placement().crystal().equals(laid.crystal())
                        && f.placement().setting().zone().equals(laid.setting().zone()))
                .map(f -> views.ofMoved(laid, f, measured, thickness, labelled))
                .orElseGet(() -> views.ofPlacement(laid, measured, thickness, labelled));
    }

    private static ViewMaker views(ImagePlus image) {
        if (image.getProperty(VIEWS) instanceof ViewMaker kept && kept.fits(image.getWidth(), image.getHeight())) {
            return kept;
        }
        ViewMaker fresh = new ViewMaker(image.getWidth(), image.getHeight());
        image.setProperty(VIEWS, fresh);
        return fresh;
    }
}
