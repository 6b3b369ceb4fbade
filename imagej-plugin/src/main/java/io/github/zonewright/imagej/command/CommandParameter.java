package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import ij.Macro;
import ij.Prefs;
import io.github.zonewright.imagej.session.Choice;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.imagej.session.KeptCalibrations;
import java.io.File;
import java.lang.reflect.Field;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.scijava.ItemIO;
import org.scijava.ItemVisibility;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** One {@code @Parameter} of a command: read, written and turned into text by reflection. */
final class CommandParameter {
    /** SciJava's style of a file parameter that names a folder. */
    static final String FOLDER_STYLE = "directory";

    private final Command command;
    private final Field field;
    private final Parameter annotation;

    private CommandParameter(Command command, Field field) {
        this.command = command;
        this.field = field;
        this.annotation = field.getAnnotation(Parameter.class);
        field.setAccessible(true);
    }

    /** The parameters of a command in the order in which they are declared, those of a class it extends first, as in SciJava. */
    static List<CommandParameter> of(Command command) {
        List<CommandParameter> found = new ArrayList<>();
        collect(command, command.getClass(), found);
        return found;
    }

    private static void collect(Command command, Class<?> type, List<CommandParameter> found) {
        if (type.getSuperclass() != null) {
            collect(command, type.getSuperclass(), found);
        }
        for (Field field : type.getDeclaredFields()) {
            if (field.isAnnotationPresent(Parameter.class)) {
                found.add(new CommandParameter(command, field));
            }
        }
    }

    /** The last part of the command's menu path, without the dots that promise a dialog. */
    static String title(Command command) {
        String path = command.getClass().getAnnotation(Plugin.class).menuPath();
        return path.substring(path.lastIndexOf('>') + 1).strip().replace("...", "");
    }

    String name() {
        return field.getName();
    }

    String label() {
        return annotation.label();
    }

    String description() {
        return annotation.description();
    }

    /** What a dialog offers; empty for free text. */
    List<String> choices() {
        if (isCalibration()) {
            return KeptCalibrations.names();
        }
        return isCrystal()
                ? CrystalChoice.names(annotation.style().equals(CrystalChoice.GROUP_STYLE))
                : Arrays.asList(annotation.choices());
    }

    private boolean isCrystal() {
        return List.of(CrystalChoice.STYLE, CrystalChoice.GROUP_STYLE).contains(annotation.style());
    }

    private boolean isCalibration() {
        return annotation.style().equals(KeptCalibrations.STYLE);
    }

    boolean isFlag() {
        return field.getType() == boolean.class;
    }

    boolean isFile() {
        return field.getType() == File.class;
    }

    boolean isFolder() {
        return isFile() && annotation.style().equals(FOLDER_STYLE);
    }

    boolean isNumber() {
        return field.getType() == double.class || field.getType() == int.class;
    }

    boolean isMessage() {
        return annotation.visibility() == ItemVisibility.MESSAGE;
    }

    /** Whether a person or a macro gives it; images and messages come from elsewhere. */
    boolean isAsked() {
        return field.getType() != ImagePlus.class && !isMessage() && annotation.type() != ItemIO.OUTPUT;
    }

    /** Sets an image parameter. */
    void fillImage(ImagePlus image) {
        if (field.getType() != ImagePlus.class || annotation.type() == ItemIO.OUTPUT) {
            return;
        }
        if (image == null && annotation.required()) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        set(image);
    }

    /** The value as a person would type it. */
    String text() {
        Object value = get();
        if (value == null) {
            return "";
        }
        if (value instanceof Double number && number == Math.rint(number) && Math.abs(number) < 1e9) {
            return Long.toString(Math.round(number));
        }
        return value.toString();
    }

    /** The value as the recorder writes it. */
    String recorded() {
        return isCrystal() || isCalibration() || choices().isEmpty() ? text() : Choice.recorded(text());
    }

    /** Takes the value from macro options; an option that is not there leaves the default. */
    void readMacro(String options) {
        String given = Macro.getValue(options, name(), null);
        if (given != null) {
            setText(isFlag() && given.equals(name()) ? "true" : given);
        } else if (isFlag() && (" " + options + " ").contains(" " + name() + " ")) {
            set(true);
        }
    }

    /** Sets the value that a person typed. */
    void setText(String text) {
        String t = text.strip();
        if (isFlag()) {
            set(flag(t));
        } else if (field.getType() == double.class) {
            set(number(t));
        } else if (field.getType() == int.class) {
            double number = number(t);
            if (number != Math.rint(number)) {
                throw wrong(t, "a whole number");
            }
            set((int) number);
        } else if (isFile()) {
            set(t.isEmpty() ? null : new File(t));
        } else {
            boolean free = isCrystal() || isCalibration() || choices().isEmpty();
            set(free ? t : Choice.pick(label(), t, choices()));
        }
    }

    /** The value a person gave last time, where it is worth remembering. */
    void recall() {
        String kept = annotation.persist() ? Prefs.get(preference(), null) : null;
        if (kept != null) {
            try {
                setText(kept);
            } catch (IllegalArgumentException e) {
                Prefs.set(preference(), text());
            }
        }
    }

    void remember() {
        if (annotation.persist()) {
            Prefs.set(preference(), text());
        }
    }

    private String preference() {
        return "zonewright." + name();
    }

    private boolean flag(String t) {
        return switch (t) {
            case "true", "1", "yes" -> true;
            case "false", "0", "no" -> false;
            default -> throw wrong(t, "true or false");
        };
    }

    private double number(String t) {
        double number;
        try {
            number = Double.parseDouble(t);
        } catch (NumberFormatException e) {
            throw wrong(t, "a number");
        }
        boolean low = !annotation.min().isEmpty() && !(number >= Double.parseDouble(annotation.min()));
        boolean high = !annotation.max().isEmpty() && !(number <= Double.parseDouble(annotation.max()));
        if (low || high) {
            throw wrong(t, annotation.min() + " to " + annotation.max());
        }
        return number;
    }

    private IllegalArgumentException wrong(String t, String expected) {
        return new IllegalArgumentException(label() + ": \"" + t + "\", expected " + expected);
    }

    private Object get() {
        try {
            return field.get(command);
        } catch (IllegalAccessException e) {
            throw new IllegalStateException(e);
        }
    }

    private void set(Object value) {
        try {
            field.set(command, value);
        } catch (IllegalAccessException e) {
            throw new IllegalStateException(e);
        }
    }
}
