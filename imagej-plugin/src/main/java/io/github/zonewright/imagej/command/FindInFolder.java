package io.github.zonewright.imagej.command;

import io.github.zonewright.imagej.bridge.FolderFrames;
import io.github.zonewright.indexing.PatternSeries;
import java.io.File;
import java.io.IOException;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Finds the zone axes of all images of a folder, without showing them. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Find Zone Axes of Folder...")
public final class FindInFolder extends SeriesCommand {
    @Parameter(label = "Folder of images", style = CommandParameter.FOLDER_STYLE)
    private File folder;

    /** For SciJava and the launcher. */
    public FindInFolder() {}

    @Override
    protected void perform() throws IOException {
        if (folder == null || folder.getPath().isBlank()) {
            throw new IllegalArgumentException("folder of images: none, expected a folder with diffraction patterns");
        }
        FolderFrames frames = FolderFrames.of(folder);
        PatternSeries series = series(crystals(), instrument(null), null);
        SeriesRun run = ready(frames, folder.getName());
        end(run, run.run(series, answer -> {}, () -> false));
    }
}
