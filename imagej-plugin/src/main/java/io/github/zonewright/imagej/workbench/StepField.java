package io.github.zonewright.imagej.workbench;

import java.awt.Dimension;
import java.awt.event.ActionEvent;
import java.awt.event.InputEvent;
import java.awt.event.KeyEvent;
import java.util.Optional;
import java.util.function.DoubleConsumer;
import javax.swing.AbstractAction;
import javax.swing.BoxLayout;
import javax.swing.JLabel;
import javax.swing.JPanel;
import javax.swing.KeyStroke;
import javax.swing.plaf.basic.BasicArrowButton;

/**
 * A number that is typed, or stepped with the buttons, the arrow keys and the wheel; with Shift a step is a tenth. The
 * field holds its value at full precision whatever it shows.
 */
final class StepField extends JPanel {
    private static final long serialVersionUID = 1L;

    private final CheckedField<Double> field;
    private final double step;
    private final int decimals;
    private double exact;
    private String shown = "";
    private transient DoubleConsumer onChange = value -> {};

    StepField(String name, double least, double most, double step, int decimals) {
        this.step = step;
        this.decimals = decimals;
        setLayout(new BoxLayout(this, BoxLayout.X_AXIS));
        field = new CheckedField<>(name, 7, Reading.number(least, most));
        add(field);
        JPanel buttons = new JPanel();
        buttons.setLayout(new BoxLayout(buttons, BoxLayout.Y_AXIS));
        buttons.add(button(javax.swing.SwingConstants.NORTH, name + " up", 1));
        buttons.add(button(javax.swing.SwingConstants.SOUTH, name + " down", -1));
        buttons.setMaximumSize(new Dimension(16, field.getPreferredSize().height));
        buttons.setPreferredSize(buttons.getMaximumSize());
        add(buttons);
        setMaximumSize(getPreferredSize());
        key(KeyEvent.VK_UP, 1);
        key(KeyEvent.VK_DOWN, -1);
        field.addMouseWheelListener(e -> {
            if (field.isFocusOwner() && e.getWheelRotation() != 0) {
                stepBy(-Integer.signum(e.getWheelRotation()), e.isShiftDown());
            }
        });
        field.onChange(() -> field.value().ifPresent(v -> {
            exact = v;
            shown = field.getText();
            onChange.accept(v);
        }));
    }

    Optional<Double> value() {
        return field.value().map(v -> field.getText().equals(shown) ? exact : v);
    }

    JLabel reasonLabel() {
        return field.reasonLabel();
    }

    void onChange(DoubleConsumer listener) {
        onChange = listener;
    }

    /** Shows a value without telling the listener; a field in which someone is typing the same value stays as it is. */
    void show(double value) {
        boolean typed = field.isFocusOwner()
                && field.value().isPresent()
                && same(field.value().get(), value);
        exact = value;
        if (!typed) {
            field.show(Reading.fixed(value, decimals));
        }
        shown = field.getText();
    }

    /** Shows nothing. */
    void clear() {
        field.show("");
        field.reasonLabel().setText("");
        field.setBackground(java.awt.Color.WHITE);
    }

    /** Swing shows the tip of what is under the pointer alone: so the field has it too, and the arrows say what they do. */
    @Override
    public void setToolTipText(String text) {
        super.setToolTipText(text);
        field.setToolTipText(text);
    }

    @Override
    public void setEnabled(boolean enabled) {
        super.setEnabled(enabled);
        field.setEnabled(enabled);
    }

    private boolean same(double a, double b) {
        return Reading.fixed(a, decimals).equals(Reading.fixed(b, decimals));
    }

    private void stepBy(int direction, boolean fine) {
        value().ifPresent(v -> {
            double next = v + direction * (fine ? step / 10 : step);
            field.show(Reading.fixed(next, decimals));
            if (field.value().isPresent()) {
                exact = next;
                shown = field.getText();
                onChange.accept(next);
            }
        });
    }

    private BasicArrowButton button(int direction, String name, int sign) {
        BasicArrowButton button = new BasicArrowButton(direction);
        int height = field.getPreferredSize().height / 2;
        button.setName(name);
        button.setPreferredSize(new Dimension(16, height));
        button.setMinimumSize(button.getPreferredSize());
        button.setMaximumSize(button.getPreferredSize());
        button.setFocusable(false);
        button.setToolTipText("One step; with Shift a tenth of it. In the field the arrow keys do the same");
        button.addActionListener(e -> stepBy(sign, (e.getModifiers() & ActionEvent.SHIFT_MASK) != 0));
        return button;
    }

    private void key(int code, int sign) {
        for (boolean fine : new boolean[] {false, true}) {
            KeyStroke stroke = KeyStroke.getKeyStroke(code, fine ? InputEvent.SHIFT_DOWN_MASK : 0);
            String action = "step " + sign + fine;
            field.getInputMap().put(stroke, action);
            field.getActionMap().put(action, new AbstractAction() {
                private static final long serialVersionUID = 1L;

                @Override
                public void actionPerformed(ActionEvent e) {
                    stepBy(sign, fine);
                }
            });
        }
    }
}
