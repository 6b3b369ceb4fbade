package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.spots.MeasuredPattern;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.OptionalDouble;
import java.util.concurrent.CancellationException;
import java.util.concurrent.atomic.AtomicInteger;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;

/** Series drawn by test code alone, with drift, blank and broken frames and frames of other zones. */
class PatternSeriesTest {

    private static final Uvw Z110 = new Uvw(1, 1, 0);
    private static final Uvw Z111 = new Uvw(1, 1, 1);
    private static final Uvw Z001 = new Uvw(0, 0, 1);

    private static List<FrameAnswer> run(PatternSeries series, FrameSource frames) {
        List<FrameAnswer> answers = new ArrayList<>();
        series.run(frames, answers::add, share -> {}, () -> false);
        return answers;
    }

    /** Seven frames turning by 0.6° each while the centre drifts by 2.5 px, with all that can go wrong in between. */
    private static DrawnSeries eventful() {
        return new DrawnSeries()
                .add(Z110, 20, 0.5, 139.3, 140.8)
                .add(Z110, 20.6, 0.5, 141.8, 140.1)
                .addBlank()
                .add(Z110, 21.2, 0.5, 144.3, 139.4)
                .addBroken("no such sector on the tape")
                .add(Z001, 50, 0.3, 146.8, 138.7)
                .add(Z110, 21.8, 0.5, 149.3, 138);
    }

    private static final List<Integer> GOOD = List.of(0, 1, 3, 5, 6);

    @Test
    void run_eventfulSeries_oneAnswerPerFrameInOrder() {
        DrawnSeries frames = eventful();
        for (boolean following : new boolean[] {false, true}) {
            List<FrameAnswer> answers =
                    run(PatternSeries.of(DrawnSeries.search()::find).withFollowing(following), frames);
            assertEquals(frames.size(), answers.size());
            for (int i = 0; i < frames.size(); i++) {
                FrameAnswer a = answers.get(i);
                assertEquals(i, a.index());
                assertEquals("frame " + (i + 1), a.label());
                assertEquals(GOOD.contains(i), a.result().best().isPresent(), a.toString());
                assertEquals(GOOD.contains(i), a.verdict() instanceof Verdict.Settled, a.toString());
                if (GOOD.contains(i)) {
                    Solution best = a.result().best().orElseThrow();
                    assertTrue(best.placement().camera().centre().distanceTo(frames.centre(i)) < 0.2, a.toString());
                    Uvw zone = best.placement().setting().zone();
                    assertEquals(i == 5 ? 1 : 2, zone.u() * zone.u() + zone.v() * zone.v() + zone.w() * zone.w());
                }
            }
            assertTrue(answers.get(2).result().explanation().contains("0 diffraction spots"), answers.get(2)::toString);
            assertEquals("no such sector on the tape", answers.get(4).result().explanation());
            assertTrue(answers.get(4).measured().isEmpty()
                    && answers.get(2).measured().isPresent());
        }
    }

    /** The angle between what was drawn, by the test's own sum: the smallest over the rotations of the cube. */
    private static double drawnAngle(DrawnSeries frames, int a, int b) {
        double least = Math.PI;
        for (Matrix3 m : DrawnSeries.ALUMINIUM.spaceGroup().properLaueRotations(DrawnSeries.ALUMINIUM.lattice())) {
            Matrix3 between =
                    frames.truth(a).inverse().after(frames.truth(b)).matrix().times(m);
            double trace = between.m00() + between.m11() + between.m22();
            least = Math.min(least, Math.acos(Math.max(-1, Math.min(1, (trace - 1) / 2))));
        }
        return Math.toDegrees(least);
    }

    /** Turned by 9° about the beam, then the other zone: 45° from [110] to [001] and what the rotation adds. */
    @Test
    void turned_isTheAngleToTheLastGoodFrame() {
        DrawnSeries frames = new DrawnSeries()
                .add(Z110, 20, 0.5, 139, 141)
                .add(Z110, 29, 0.5, 139, 141)
                .addBlank()
                .add(Z001, 50, 0.3, 139, 141);
        List<FrameAnswer> answers = run(PatternSeries.of(DrawnSeries.search()::find), frames);
        assertEquals(OptionalDouble.empty(), answers.get(0).turned());
        assertEquals(OptionalDouble.empty(), answers.get(2).turned());
        for (int[] pair : new int[][] {{0, 1}, {1, 3}}) {
            double turned = answers.get(pair[1]).turned().orElseThrow();
            double error = Math.hypot(leanError(answers.get(pair[0])), leanError(answers.get(pair[1])));
            assertEquals(drawnAngle(frames, pair[0], pair[1]), Math.toDegrees(turned), 2 * Math.toDegrees(error));
            assertTrue(error < Math.toRadians(2), "the leans are not told at all: " + error);
        }
    }

    /** Standard uncertainty of the lean as stated, in radians; the rotation about the beam is known far better. */
    private static double leanError(FrameAnswer answer) {
        SolutionErrors errors = answer.result().best().orElseThrow().errors();
        return Math.max(errors.leanX(), errors.leanY());
    }

    @Test
    void run_moreThreads_sameAnswers() {
        for (boolean following : new boolean[] {false, true}) {
            PatternSeries series = PatternSeries.of(DrawnSeries.search()::find).withFollowing(following);
            List<FrameAnswer> one = run(series, eventful());
            List<FrameAnswer> more = run(series.withThreads(3), eventful());
            for (int i = 0; i < one.size(); i++) {
                assertEquals(one.get(i).result(), more.get(i).result());
                assertEquals(one.get(i).turned(), more.get(i).turned());
                assertEquals(one.get(i).followed(), more.get(i).followed());
            }
        }
    }

    /** Searched are the first frame, the other zone, and the frame after it; the blank one is asked for its reason. */
    @Test
    void following_searchesOnlyWhereItMust() {
        AtomicInteger searched = new AtomicInteger();
        OrientationSearch search = DrawnSeries.search();
        List<FrameAnswer> answers = run(
                PatternSeries.of((pattern, progress, cancelled) -> {
                            searched.incrementAndGet();
                            return search.find(pattern, progress, cancelled);
                        })
                        .withFollowing(true),
                eventful());
        assertEquals(
                List.of(false, true, false, true, false, false, false),
                answers.stream().map(FrameAnswer::followed).toList());
        assertEquals(4, searched.get());
        // Followed or searched, the answer is the same within what both say of themselves.
        List<FrameAnswer> alone = run(PatternSeries.of(search::find), eventful());
        for (int i : new int[] {1, 3}) {
            Solution a = answers.get(i).result().best().orElseThrow();
            Solution b = alone.get(i).result().best().orElseThrow();
            assertEquals(b.matches().size(), a.matches().size());
            assertEquals(b.rmsResidual(), a.rmsResidual(), 0.02);
            assertEquals(
                    0,
                    HalfTurn.angleBetween(a, b),
                    3 * Math.hypot(a.errors().leanX(), a.errors().leanY()));
        }
    }

    /** Silver's edge is 0.9 % longer than that of aluminium: with a scale good to 2 % both place the same spots. */
    @Test
    void following_tiedAnswers_stayTied() {
        DrawnSeries frames = new DrawnSeries();
        for (int i = 0; i < 3; i++) {
            frames.add(Z110, 20 + 0.5 * i, 0.4, 139, 141);
        }
        OrientationSearch aluminium = DrawnSeries.search();
        OrientationSearch silver = OrientationSearch.of(
                CrystalShelf.find("silver").orElseThrow(), DrawnSeries.BEAM, DrawnSeries.CONSTANT, 0.02, false);
        FrameSearch both = (pattern, progress, cancelled) -> new SearchResult(
                Stream.of(aluminium, silver)
                        .flatMap(s -> s.find(pattern).solutions().stream())
                        .sorted(Comparator.comparingDouble(Solution::score).reversed())
                        .toList(),
                "two crystals");
        List<FrameAnswer> answers = run(PatternSeries.of(both).withFollowing(true), frames);
        for (FrameAnswer a : answers) {
            assertEquals(a.index() > 0, a.followed());
            assertTrue(a.verdict() instanceof Verdict.Tied, a.verdict().sentence());
        }
    }

    /** The last frame shows a corner of the pattern: it is searched, since less is told apart by fewer spots. */
    @Test
    void following_fewerSpots_isSearched() {
        DrawnSeries frames = new DrawnSeries()
                .add(Z110, 20, 0.4, 139, 141)
                .add(Z110, 20.3, 0.4, 139, 141)
                .add(Z110, 20.6, 0.4, 30, 30);
        List<FrameAnswer> answers =
                run(PatternSeries.of(DrawnSeries.search()::find).withFollowing(true), frames);
        assertEquals(
                List.of(false, true, false),
                answers.stream().map(FrameAnswer::followed).toList());
    }

    /**
     * Along [111] of a cube half a turn is not told by the zero layer: what comes first may be either, and a series must not
     * jump between them.
     */
    @Test
    void halfTurn_staysWhatItWas() {
        DrawnSeries frames = new DrawnSeries();
        for (int i = 0; i < 6; i++) {
            frames.add(Z111, 10 + 0.5 * i, i % 2 == 0 ? 0.4 : -0.4, 139 + i, 141 - i);
        }
        for (boolean following : new boolean[] {false, true}) {
            List<FrameAnswer> answers =
                    run(PatternSeries.of(DrawnSeries.search()::find).withFollowing(following), frames);
            for (int i = 1; i < frames.size(); i++) {
                assertEquals(following, answers.get(i).followed());
                Rotation a = rotation(answers.get(i - 1));
                Rotation b = rotation(answers.get(i));
                double least =
                        DrawnSeries.ALUMINIUM.spaceGroup().properLaueRotations(DrawnSeries.ALUMINIUM.lattice()).stream()
                                .mapToDouble(m -> a.angleTo(b.after(Rotation.ofMatrix(m))))
                                .min()
                                .orElseThrow();
                assertTrue(least < Math.toRadians(3), "frame " + (i + 1) + " turned by " + Math.toDegrees(least));
                for (SpotMatch m : answers.get(i).result().best().orElseThrow().matches()) {
                    assertTrue(m.residual() < 2, m.toString());
                }
            }
        }
    }

    private static Rotation rotation(FrameAnswer answer) {
        return answer.result().best().orElseThrow().placement().orientation().rotation();
    }

    @Test
    void run_readsOneAtATimeAndNotFarAhead() {
        DrawnSeries frames = new DrawnSeries();
        for (int i = 0; i < 24; i++) {
            frames.addBlank();
        }
        for (int threads : new int[] {1, 3}) {
            int readBefore = frames.read();
            AtomicInteger taken = new AtomicInteger();
            AtomicInteger most = new AtomicInteger();
            PatternSeries.of(DrawnSeries.search()::find)
                    .withThreads(threads)
                    .run(
                            frames,
                            answer -> most.accumulateAndGet(
                                    frames.read() - readBefore - taken.getAndIncrement(), Math::max),
                            share -> {},
                            () -> false);
            assertEquals(24, taken.get());
            assertTrue(most.get() <= threads + 2, "alive: " + most.get());
        }
        assertEquals(1, frames.mostReading());
    }

    @Test
    void run_cancelled_keepsTheRowsSoFarAndLeavesNoThread() {
        List<FrameAnswer> answers = new ArrayList<>();
        List<Double> shares = new ArrayList<>();
        DrawnSeries frames = eventful();
        CancellationException stopped = assertThrows(
                CancellationException.class,
                () -> PatternSeries.of(DrawnSeries.search()::find)
                        .withThreads(2)
                        .run(frames, answers::add, shares::add, () -> answers.size() == 2));
        assertTrue(stopped.getMessage().contains("after 2 of 7 frames"), stopped.getMessage());
        assertEquals(2, answers.size());
        assertEquals(List.of(1 / 7.0, 2 / 7.0), shares);
        assertTrue(Thread.getAllStackTraces().keySet().stream()
                .noneMatch(t -> t.getName().equals("pattern series")));
    }

    @Test
    void run_searchThatFails_isARow() {
        DrawnSeries frames = new DrawnSeries().addBlank().addBlank();
        for (boolean following : new boolean[] {false, true}) {
            List<FrameAnswer> answers = run(
                    PatternSeries.of((pattern, progress, cancelled) -> {
                                throw new IllegalArgumentException("cell: 900 Å, expected less");
                            })
                            .withFollowing(following),
                    frames);
            assertEquals(2, answers.size());
            assertEquals(
                    "Open: cell: 900 Å, expected less", answers.get(1).verdict().sentence());
        }
    }

    @Test
    void run_noFrames_noAnswers() {
        assertEquals(List.of(), run(PatternSeries.of(DrawnSeries.search()::find), new DrawnSeries()));
    }

    @Test
    void withThreads_outOfRange_isRefused() {
        PatternSeries series = PatternSeries.of(DrawnSeries.search()::find);
        for (int threads : new int[] {0, 257}) {
            String said = assertThrows(IllegalArgumentException.class, () -> series.withThreads(threads))
                    .getMessage();
            assertTrue(said.contains("threads: " + threads + ", expected 1 to 256"), said);
        }
    }

    @Test
    void withoutPixels_answersTheSame_measuringAgainOnlyWhenAsked() {
        DrawnSeries frames = eventful();
        MeasuredPattern whole = run(PatternSeries.of(DrawnSeries.search()::find), frames)
                .get(0)
                .measured()
                .orElseThrow();
        AtomicInteger again = new AtomicInteger();
        MeasuredPattern light = whole.withoutPixels(() -> {
            again.incrementAndGet();
            return whole;
        });
        assertEquals(whole.spots(), light.spots());
        assertEquals(whole.centre(), light.centre());
        assertEquals(whole.spotSigma(), light.spotSigma());
        assertEquals(whole.hidden().count(), light.hidden().count());
        assertEquals(0, again.get());
        assertEquals(
                Refinement.refine(whole, solution(whole).placement()),
                Refinement.refine(light, solution(whole).placement()));
        assertEquals(whole.backgroundAt(frames.centre(0)), light.backgroundAt(frames.centre(0)));
        assertEquals(1, again.get());
        assertFalse(light.isHidden(frames.centre(0)));
    }

    private static Solution solution(MeasuredPattern pattern) {
        return DrawnSeries.search().find(pattern).best().orElseThrow();
    }
}
