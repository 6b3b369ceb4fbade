package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import ij.io.SaveDialog;
import io.github.zonewright.imagej.bridge.SolutionTable;
import io.github.zonewright.imagej.session.Keep;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Solution;
import java.io.File;
import java.io.IOException;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import javax.swing.JButton;

/** What is kept of the chosen solution. */
final class KeepSection extends Section {
    private static final long serialVersionUID = 1L;

    /** Writes to a file. */
    @FunctionalInterface
    private interface Writer {
        void write(File file) throws IOException;
    }

    private final JButton record = new JButton("Record (CIF)…");
    private final JButton spots = new JButton("Spots (CSV)…");
    private final JButton report = new JButton("Report (HTML)…");
    private final JButton table = new JButton("Table");
    private transient Optional<Solution> solution = Optional.empty();
    private transient ImagePlus image;
    private String title = "pattern";
    private transient Consumer<String> onRefused = message -> {};

    KeepSection() {
        super("Keep");
        for (JButton button : new JButton[] {record, report, spots, table}) {
            button.setFont(Looks.text());
            button.setName(button.getText());
        }
        record.setToolTipText("Writes solution or hand-laid pattern as a CIF file, from which it can be read back");
        spots.setToolTipText("Writes the explained and unexplained spots as a table");
        report.setToolTipText(
                "Writes one page to read and print: marked pattern, answer, uncertainties, spots, cautions");
        table.setToolTipText("Shows the explained spots as an ImageJ table");
        wide(line(record, report, spots, table));
        record.addActionListener(e -> save("record", ".cif", file -> Keep.record(image, file)));
        report.addActionListener(e -> save("report", ".html", file -> Keep.report(image, file)));
        spots.addActionListener(e -> save("spots", ".csv", file -> Keep.spots(solution.orElseThrow(), file)));
        table.addActionListener(e -> solution.ifPresent(s -> {
            SolutionTable.spots(s).show("Spots of " + title);
            kept("table", "true");
        }));
    }

    JButton record() {
        return record;
    }

    void onRefused(Consumer<String> listener) {
        onRefused = listener;
    }

    void show(Optional<ImagePlus> shown, Optional<Solution> chosen) {
        solution = chosen;
        image = shown.orElse(null);
        title = shown.map(ImagePlus::getTitle).orElse("pattern");
        boolean laid = shown.map(Sitting::of).flatMap(Sitting::placement).isPresent();
        record.setEnabled(laid);
        report.setEnabled(laid);
        spots.setEnabled(chosen.isPresent());
        table.setEnabled(chosen.isPresent());
    }

    private void save(String key, String extension, Writer writer) {
        SaveDialog dialog = new SaveDialog("Keep", title.replaceAll("\\.[A-Za-z]+$", ""), extension);
        if (dialog.getFileName() == null) {
            return;
        }
        try {
            File file = new File(dialog.getDirectory(), dialog.getFileName());
            writer.write(file);
            kept(key, file.getPath());
        } catch (IOException e) {
            onRefused.accept(e.getMessage());
        }
    }

    private static void kept(String key, String value) {
        Recording.of("Keep Solution...", List.of(new Recording.Option(key, value)));
    }
}
