package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.session.Sitting;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.AfterAll;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.scijava.Context;
import org.scijava.command.CommandInfo;
import org.scijava.command.CommandModule;
import org.scijava.command.CommandService;
import org.scijava.module.ModuleItem;

/** What Fiji relies on: the commands are found, their parameters are understood, and they run from SciJava. */
class SciJavaContextTest {
    private static Context context;
    private static CommandService commands;

    @BeforeAll
    static void start() {
        context = new Context(CommandService.class);
        commands = context.service(CommandService.class);
    }

    @AfterAll
    static void end() {
        context.dispose();
    }

    @Test
    void commands_areInTheMenu() {
        List<String> paths = commands.getCommands().stream()
                .filter(info -> info.getDelegateClassName().startsWith("io.github.zonewright."))
                .map(info -> info.getMenuPath().getMenuString(false))
                .sorted()
                .toList();
        assertEquals(32, paths.size(), paths.toString());
        assertTrue(paths.stream().allMatch(p -> p.startsWith("Plugins > Zonewright")), paths.toString());
    }

    @Test
    void parameters_areValidAndLabelled() {
        for (Class<? extends PatternCommand> type : List.of(
                FindZoneAxis.class,
                FindInStack.class,
                FindInFolder.class,
                LayPattern.class,
                CalibrateRings.class,
                MeasureNet.class)) {
            CommandInfo info = commands.getCommand(type);
            assertTrue(info.isValid(), () -> info.getProblems().toString());
            for (ModuleItem<?> input : info.inputs()) {
                boolean image = input.getType() == ImagePlus.class;
                assertTrue(image || !input.getLabel().isEmpty(), input.getName());
            }
        }
    }

    /** Those of a class that a command extends come first, there as in our own dialogs. */
    @Test
    void parameters_haveTheOrderOfOurOwnDialogs() {
        for (PatternCommand command :
                List.of(new ShowCrystal(), new CalibrateRings(), new DrawZoneChart(), new FindInFolder())) {
            List<String> inputs = new ArrayList<>();
            commands.getCommand(command.getClass()).inputs().forEach(item -> inputs.add(item.getName()));
            inputs.remove("image");
            assertEquals(
                    CommandParameter.of(command).stream()
                            .filter(CommandParameter::isAsked)
                            .map(CommandParameter::name)
                            .toList(),
                    inputs);
        }
    }

    @Test
    void find_runsFromSciJava() throws Exception {
        ImagePlus image = TestPatterns.imageOfUser();
        Fingerprint before = Fingerprint.of(image);
        CommandModule run = commands.run(
                        FindZoneAxis.class,
                        true,
                        Map.of(
                                "image",
                                image,
                                "crystal",
                                "Cu",
                                "kilovolts",
                                200,
                                "scale",
                                TestPatterns.CONSTANT,
                                "table",
                                false))
                .get();
        assertFalse(run.isCanceled(), run.getCancelReason());
        assertTrue(((String) run.getOutput("answer")).contains("zone axis"));
        before.assertSame(image);
        assertTrue(Sitting.of(image).chosen().isPresent());
    }

    @Test
    void refusal_isTheCancelReason() throws Exception {
        CommandModule run = commands.run(
                        FindZoneAxis.class,
                        true,
                        Map.of("image", TestPatterns.image(), "crystal", "unobtainium", "table", false))
                .get();
        assertTrue(run.isCanceled());
        assertTrue(run.getCancelReason().contains("unobtainium"), run.getCancelReason());
    }
}
