package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.command.RefinePattern;
import io.github.zonewright.imagej.session.AppliedCalibration;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.ReferenceReflection;
import io.github.zonewright.imagej.session.Refining;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.LockedRefinement.Lock;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.PatternCentre;
import java.util.List;
import java.util.Optional;
import java.util.Set;

/** Lays a pattern over the current image by hand, moves it and refines it. */
final class HandDesk {
    private final HandSection section;
    private final InstrumentSection instrument;
    private final CrystalSection crystal;
    private final Bench bench;
    private final Runner runner;

    /** The pattern that was too far from the spots to refine, as long as it lies there. */
    private Optional<Placement> refused = Optional.empty();

    HandDesk(HandSection section, InstrumentSection instrument, CrystalSection crystal, Bench bench, Runner runner) {
        this.section = section;
        this.instrument = instrument;
        this.crystal = crystal;
        this.bench = bench;
        this.runner = runner;
        section.onChange(this::moved);
        section.onNew(this::lay);
        section.refine().addActionListener(e -> refine());
        section.undo().addActionListener(e -> undo());
        section.back().addActionListener(e -> bench.image().ifPresent(HandKeys::goBack));
        section.indices()
                .addActionListener(e -> bench.image().ifPresent(i -> {
                    bench.sitting().withLabels(section.indices().isSelected()).show(i);
                    SeeingSection.record(i);
                }));
    }

    /** Shows what is known of the current image. */
    void refresh() {
        Optional<ImagePlus> over = bench.image();
        Sitting now = bench.sitting();
        if (refused.isPresent() && !refused.equals(now.placement())) {
            refused = Optional.empty();
            bench.say("");
        }
        section.show(now.placement(), now.chosen());
        section.indices().setSelected(now.labelled());
        section.refine()
                .setEnabled(over.isPresent()
                        && runner.isFree()
                        && now.measured().isPresent()
                        && now.placement().isPresent());
        section.back()
                .setEnabled(now.fit()
                        .filter(f -> now.chosen().filter(f::equals).isEmpty())
                        .isPresent());
        section.undo().setEnabled(over.isPresent() && !History.of(over.get()).isEmpty());
    }

    /** Takes back the last change. */
    void undo() {
        bench.image()
                .ifPresent(i -> History.of(i).back().ifPresent(before -> {
                    before.show(i);
                    LaidRecord.back(before, crystal.named());
                }));
        bench.refresh();
    }

    /** The same zone of another crystal in place of the pattern that lies there. */
    void relay(Crystal other) {
        Optional<Placement> laid =
                bench.sitting().placement().filter(p -> !p.crystal().equals(other));
        if (laid.isEmpty()) {
            return;
        }
        Placement p = laid.get();
        try {
            ZoneSetting s = p.setting();
            ZoneSetting setting = new ZoneSetting(
                    s.zone(), ReferenceReflection.of(other, s.zone()), s.rotation(), s.leanX(), s.leanY());
            bench.change(before ->
                    before.withSolutions(List.of()).withPlacement(new Placement(other, p.beam(), setting, p.camera())));
            LaidRecord.change(p, bench.sitting(), crystal.named());
        } catch (IllegalArgumentException e) {
            bench.say(e.getMessage());
        }
    }

    private void moved(Placement placement) {
        bench.image().ifPresent(i -> {
            Sitting before = Sitting.of(i);
            History.of(i).keepBefore(i, placement);
            before.withPlacement(placement).show(i);
            LaidRecord.change(before.placement().orElse(placement), Sitting.of(i), crystal.named());
        });
    }

    private void lay(Uvw zone) {
        Optional<Instrument> said = instrument.instrument();
        if (bench.image().isEmpty() || said.isEmpty() || crystal.crystal().isEmpty()) {
            return;
        }
        ImagePlus over = bench.image().get();
        Crystal c = crystal.crystal().get();
        try {
            PixelPoint centre = bench.sitting()
                    .measured()
                    .flatMap(MeasuredPattern::centre)
                    .map(PatternCentre::position)
                    .or(() -> said.get().applied().flatMap(AppliedCalibration::centre))
                    .orElse(new PixelPoint(over.getWidth() / 2.0, over.getHeight() / 2.0));
            ZoneSetting setting = ZoneSetting.onZone(zone, ReferenceReflection.of(c, zone), 0);
            Camera camera = said.get().camera(centre, over);
            Placement placement = new Placement(c, said.get().beam(), setting, camera);
            bench.change(s -> s.withPlacement(placement));
            LaidRecord.back(bench.sitting(), crystal.named());
        } catch (IllegalArgumentException e) {
            bench.say(e.getMessage());
        }
    }

    private void refine() {
        Sitting now = bench.sitting();
        if (now.measured().isEmpty() || now.placement().isEmpty()) {
            return;
        }
        MeasuredPattern measured = now.measured().get();
        Placement from = now.placement().get();
        Set<Lock> held = section.held();
        Refining refining = Refining.of(instrument.instrument(), from, held);
        runner.start((progress, stopped) -> refining.run(measured, from), solution -> refined(solution, held));
    }

    private void refined(Optional<Solution> solution, Set<Lock> held) {
        if (solution.isEmpty()) {
            refused = bench.sitting().placement();
            bench.say(Refining.NONE);
            return;
        }
        bench.change(s -> s.withRefined(solution.get()));
        Recording.of(
                "Refine Pattern...",
                RefinePattern.KEYS.entrySet().stream()
                        .map(e -> new Recording.Option(e.getValue(), Boolean.toString(held.contains(e.getKey()))))
                        .toList());
    }
}
