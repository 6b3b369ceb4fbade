package io.github.zonewright.imagej.workbench;

import ij.plugin.frame.Recorder;
import java.util.List;

/** Writes what is done with buttons and mouse into ImageJ's recorder, as the command that does the same. */
final class Recording {
    private Recording() {}

    /** One parameter of a command. */
    record Option(String name, String value) {}

    /** Records a command, if the recorder is open. */
    static void of(String command, List<Option> options) {
        if (Recorder.record) {
            Recorder.setCommand(command);
            options.forEach(o -> Recorder.recordOption(o.name(), o.value()));
            Recorder.saveCommand();
        }
    }

    /** Records a command with one flag set, if the recorder is open. */
    static void flag(String command, String name) {
        of(command, List.of(new Option(name, "true")));
    }
}
