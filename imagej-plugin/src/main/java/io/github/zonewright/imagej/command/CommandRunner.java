package io.github.zonewright.imagej.command;

import ij.IJ;
import ij.Macro;
import ij.WindowManager;
import ij.plugin.frame.Recorder;
import java.util.List;
import org.scijava.command.Command;

/**
 * Runs a command in plain ImageJ: reads its {@code @Parameter}s, asks for them in a dialog or takes them from the macro,
 * records them, and shows the reason when it refuses. In Fiji SciJava does all this, and this class is not used.
 */
public final class CommandRunner {
    private static final String ROOT = "io.github.zonewright.imagej.";
    private static final String TITLE = "Zonewright";

    private CommandRunner() {}

    /**
     * Runs a command for a person or a macro.
     *
     * @param commandName package and class below {@code io.github.zonewright.imagej}, for example {@code
     *     command.LayPattern}
     */
    public static void run(String commandName) {
        Command command = create(commandName);
        List<CommandParameter> parameters = CommandParameter.of(command);
        try {
            for (CommandParameter parameter : parameters) {
                parameter.fillImage(WindowManager.getCurrentImage());
            }
            if (!fill(command, parameters)) {
                return;
            }
        } catch (IllegalArgumentException e) {
            IJ.error(TITLE, PatternCommand.sentence(e.getMessage()));
            return;
        }
        command.run();
        if (command instanceof PatternCommand own && own.isCanceled()) {
            IJ.error(TITLE, own.getCancelReason());
        }
    }

    /**
     * Runs a command for a person in a thread of its own.
     *
     * @param commandName as for {@link #run}
     */
    public static void start(String commandName) {
        new Thread(() -> run(commandName), "Run$_" + commandName).start();
    }

    private static boolean fill(Command command, List<CommandParameter> parameters) {
        List<CommandParameter> asked =
                parameters.stream().filter(CommandParameter::isAsked).toList();
        if (asked.isEmpty()) {
            return true;
        }
        String options = Macro.getOptions();
        if (options != null) {
            MacroKeys.check(options, asked.stream().map(CommandParameter::name).toList());
            asked.forEach(p -> p.readMacro(options));
            return true;
        }
        if (!new CommandDialog(CommandParameter.title(command), asked).ask()) {
            return false;
        }
        if (Recorder.record) {
            asked.forEach(p -> Recorder.recordOption(p.name(), p.recorded()));
        }
        return true;
    }

    private static Command create(String commandName) {
        try {
            return Class.forName(ROOT + commandName)
                    .asSubclass(Command.class)
                    .getConstructor()
                    .newInstance();
        } catch (ReflectiveOperationException e) {
            throw new IllegalStateException("command " + commandName + " of plugins.config is not in the jar", e);
        }
    }
}
