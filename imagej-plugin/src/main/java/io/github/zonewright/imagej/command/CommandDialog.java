package io.github.zonewright.imagej.command;

import ij.gui.GenericDialog;
import java.awt.Checkbox;
import java.awt.Label;
import java.awt.TextField;
import java.util.ArrayList;
import java.util.List;

/**
 * Asks for the parameters of a command in an ImageJ dialog. What is typed wrongly is named beneath the fields at once,
 * and OK waits until it is right. The dialog's own macro recording, which goes by labels, is not used.
 */
final class CommandDialog {
    private static final int FILE_COLUMNS = 22;

    private record Entry(CommandParameter parameter, Object component) {
        String text() {
            if (component instanceof TextField field) {
                return field.getText();
            }
            if (component instanceof Checkbox box) {
                return Boolean.toString(box.getState());
            }
            return ((java.awt.Choice) component).getSelectedItem();
        }
    }

    private final GenericDialog dialog;
    private final List<Entry> entries = new ArrayList<>();
    private final Label reason;

    CommandDialog(String title, List<CommandParameter> parameters) {
        dialog = new GenericDialog(title);
        for (CommandParameter parameter : parameters) {
            parameter.recall();
            add(parameter);
        }
        dialog.addMessage("Choose values, then OK.                                                            ");
        reason = (Label) dialog.getMessage();
        dialog.addDialogListener((d, event) -> check());
    }

    /** Shows the dialog; true when the person said OK, and then the parameters are set. */
    boolean ask() {
        dialog.showDialog();
        if (dialog.wasCanceled()) {
            return false;
        }
        for (Entry entry : entries) {
            entry.parameter.setText(entry.text());
            entry.parameter.remember();
        }
        return true;
    }

    private void add(CommandParameter parameter) {
        String label = parameter.label();
        Object component;
        if (parameter.isFlag()) {
            dialog.addCheckbox(label, parameter.text().equals("true"));
            component = last(dialog.getCheckboxes());
        } else if (!parameter.choices().isEmpty()) {
            dialog.addChoice(label + ":", parameter.choices().toArray(String[]::new), parameter.text());
            component = last(dialog.getChoices());
        } else if (parameter.isFolder()) {
            dialog.addDirectoryField(label + ":", parameter.text(), FILE_COLUMNS);
            component = last(dialog.getStringFields());
        } else if (parameter.isFile()) {
            dialog.addFileField(label + ":", parameter.text(), FILE_COLUMNS);
            component = last(dialog.getStringFields());
        } else {
            dialog.addStringField(label + ":", parameter.text(), parameter.isNumber() ? 8 : 12);
            component = last(dialog.getStringFields());
        }
        entries.add(new Entry(parameter, component));
    }

    private boolean check() {
        String before = "";
        for (Entry entry : entries) {
            before = entry.parameter.text();
            try {
                entry.parameter.setText(entry.text());
            } catch (IllegalArgumentException e) {
                entry.parameter.setText(before);
                reason.setText(e.getMessage());
                return false;
            }
        }
        reason.setText("");
        return true;
    }

    private static Object last(List<?> components) {
        return components.get(components.size() - 1);
    }
}
