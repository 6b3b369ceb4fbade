package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.bridge.StackFrames;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.imagej.session.SliceMarks;
import io.github.zonewright.indexing.FrameAnswer;
import io.github.zonewright.indexing.PatternSeries;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.util.List;
import java.util.function.BooleanSupplier;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Finds the zone axes of all slices of a stack; each slice keeps its answer and shows it when it is seen. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Find Zone Axes of Stack...")
public final class FindInStack extends SeriesCommand {
    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(label = "First slice", min = "1", persist = false)
    private int first = 1;

    @Parameter(label = "Last slice (0 for the end)", min = "0", persist = false)
    private int last;

    @Parameter(label = "Show indices")
    private boolean indices;

    /** For SciJava and the launcher. */
    public FindInStack() {}

    @Override
    protected void perform() throws IOException {
        ImagePlus stack = image != null ? image : WindowManager.getCurrentImage();
        if (stack == null) {
            throw new IllegalArgumentException("no image is open: open a stack of diffraction patterns first");
        }
        StackFrames frames = StackFrames.of(stack, first, last);
        List<Crystal> crystals = crystals();
        Instrument said = instrument(stack);
        PatternSeries series = series(crystals, said, stack);
        SeriesRun run = ready(frames, stack.getTitle());
        said.keepWith(stack, crystals.get(0));
        boolean open = stack.getWindow() != null;
        BooleanSupplier closed = () -> open && stack.getWindow() == null;
        run.onRow(stack::setSlice);
        SliceMarks marks = SliceMarks.of(stack);
        StackFrames again = StackFrames.of(stack, first, last);
        end(run, run.run(series, answer -> keep(marks, stack, again, answer), closed));
    }

    /** What a slice showed before stays where nothing could be measured. */
    private void keep(SliceMarks marks, ImagePlus stack, StackFrames frames, FrameAnswer answer) {
        int slice = stack.getStackSize() > 1 ? frames.number(answer.index()) : 0;
        answer.measured()
                .map(m -> m.withoutPixels(() -> again(frames, answer.index())))
                .map(m -> Sitting.EMPTY
                        .withMeasured(m)
                        .withSolutions(answer.result().solutions())
                        .withLabels(indices))
                .ifPresent(sitting -> marks.keep(slice, sitting));
    }

    private static MeasuredPattern again(StackFrames frames, int index) {
        try {
            return SpotFinder.measure(frames.read(index));
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}
