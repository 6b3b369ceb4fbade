package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.ImagePlus;
import ij.Prefs;
import ij.WindowManager;
import ij.text.TextPanel;
import ij.text.TextWindow;
import io.github.zonewright.imagej.bridge.ImageFrames;
import io.github.zonewright.imagej.bridge.SeriesTable;
import io.github.zonewright.imagej.session.Keep;
import io.github.zonewright.indexing.FrameAnswer;
import io.github.zonewright.indexing.PatternSeries;
import io.github.zonewright.indexing.Verdict;
import java.awt.GraphicsEnvironment;
import java.awt.event.MouseAdapter;
import java.awt.event.MouseEvent;
import java.io.File;
import java.io.IOException;
import java.nio.file.Files;
import java.util.HashMap;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.CancellationException;
import java.util.function.BooleanSupplier;
import java.util.function.Consumer;
import java.util.function.IntConsumer;
import java.util.stream.Collectors;
import java.util.stream.Stream;

/** Runs a series and shows how it goes: a table that grows, ImageJ's status bar, a record for each frame that has an answer. */
final class SeriesRun {
    private static final long NANOS_BETWEEN_SHOWS = 500_000_000L;

    private final ImageFrames frames;
    private final String name;
    private final SeriesTable rows = new SeriesTable();
    private final Map<String, Integer> verdicts = new HashMap<>();
    private final boolean shown;
    private Optional<File> records = Optional.empty();
    private Optional<String> title = Optional.empty();
    private IntConsumer onRow = number -> {};
    private long lastShown;
    private int done;

    /** A series of frames under a name; the table is shown where there is a display and a person wants it. */
    SeriesRun(ImageFrames frames, String name, boolean table) {
        this.frames = frames;
        this.name = name;
        this.shown = table && !GraphicsEnvironment.isHeadless();
    }

    /** Tells the number of the frame whose row a person clicks. */
    void onRow(IntConsumer listener) {
        onRow = listener;
    }

    /** Writes the record of each frame whose verdict is settled or tied into a folder, which is made if need be. */
    void recordInto(File folder) throws IOException {
        if (folder == null || folder.getPath().isBlank()) {
            return;
        }
        try {
            Files.createDirectories(folder.toPath());
        } catch (IOException e) {
            throw new IOException("folder " + folder + " can't be made: is there a file of that name?", e);
        }
        records = Optional.of(folder);
        frames.keep();
    }

    /**
     * Runs it, in as many threads as ImageJ is set to use.
     *
     * @param series the series
     * @param each is given each answer after its row was made
     * @param gone asked whether there is a reason to stop other than Esc
     * @return how it went, in a sentence
     */
    String run(PatternSeries series, Consumer<FrameAnswer> each, BooleanSupplier gone) {
        IJ.resetEscape();
        String end = ".";
        try {
            series.withThreads(Math.max(1, Math.min(frames.size(), Prefs.getThreads())))
                    .run(
                            frames,
                            answer -> {
                                take(answer);
                                each.accept(answer);
                            },
                            IJ::showProgress,
                            () -> IJ.escapePressed() || gone.getAsBoolean());
        } catch (CancellationException e) {
            end = "; stopped after " + done + " of " + frames.size() + ".";
        } finally {
            IJ.showProgress(1);
        }
        show();
        String counts = Stream.of("settled", "tied", "open")
                .filter(verdicts::containsKey)
                .map(word -> verdicts.get(word) + " " + word)
                .collect(Collectors.joining(", "));
        String answer = done + (done == 1 ? " frame" : " frames") + (counts.isEmpty() ? "" : ": " + counts) + end;
        IJ.showStatus(answer);
        return answer;
    }

    private void take(FrameAnswer answer) {
        Verdict verdict = answer.verdict();
        String word = SeriesTable.word(verdict);
        int number = frames.number(answer.index());
        Optional<ImagePlus> frame = frames.take(answer.index());
        String note = "";
        if (frame.isPresent() && !(verdict instanceof Verdict.Open)) {
            note = record(answer, number, frame.get());
        }
        rows.add(number, answer, note);
        verdicts.merge(word, 1, Integer::sum);
        done++;
        IJ.showStatus("Frame " + number + ": " + word + " (" + done + " of " + frames.size() + "; Esc stops)");
        if (System.nanoTime() - lastShown > NANOS_BETWEEN_SHOWS) {
            show();
        }
    }

    private String record(FrameAnswer answer, int number, ImagePlus frame) {
        String label = answer.label().lines().findFirst().orElse("").replaceAll("[^\\p{L}\\p{N}._-]+", "_");
        String file = String.format(Locale.ROOT, "%05d%s.cif", number, label.isEmpty() ? "" : "-" + label);
        try {
            Keep.record(answer.result().best().orElseThrow(), frame, new File(records.orElseThrow(), file));
            return "";
        } catch (IOException e) {
            return PatternCommand.sentence(e.getMessage());
        }
    }

    /** Writes the table as it is. */
    void save(File file) throws IOException {
        if (file != null && !file.getPath().isBlank()) {
            try {
                rows.table().saveAs(file.getPath());
            } catch (IOException e) {
                throw new IOException(
                        "file " + file + " can't be written: is there such a folder, and may you write there?", e);
            }
        }
    }

    private void show() {
        if (!shown) {
            return;
        }
        boolean first = title.isEmpty();
        if (first) {
            title = Optional.of(freeTitle());
        } else if (WindowManager.getWindow(title.get()) == null) {
            return;
        }
        rows.table().show(title.get());
        lastShown = System.nanoTime();
        if (first && WindowManager.getWindow(title.get()) instanceof TextWindow window) {
            listen(window.getTextPanel());
        }
    }

    /** A table that is there already stays. */
    private String freeTitle() {
        String wanted = "Zone axes of " + name;
        String free = wanted;
        for (int i = 2; WindowManager.getWindow(free) != null; i++) {
            free = wanted + " (" + i + ")";
        }
        return free;
    }

    private void listen(TextPanel panel) {
        panel.addMouseListener(new MouseAdapter() {
            @Override
            public void mouseReleased(MouseEvent e) {
                int row = panel.getSelectionStart();
                if (row >= 0
                        && row == panel.getSelectionEnd()
                        && row < rows.table().size()) {
                    onRow.accept((int) rows.table().getValue("frame", row));
                }
            }
        });
    }
}
