package io.github.zonewright.imagej.workbench;

import java.awt.Color;
import java.awt.Dimension;
import java.util.Optional;
import java.util.function.Function;
import javax.swing.JLabel;
import javax.swing.JTextField;
import javax.swing.event.DocumentEvent;
import javax.swing.event.DocumentListener;

/**
 * A text field that is checked with every key. What is wrong is said in the label that stands beside it.
 *
 * @param <T> what the text means
 */
final class CheckedField<T> extends JTextField {
    private static final long serialVersionUID = 1L;
    private static final Color WRONG_GROUND = new Color(0xFFE9E0);

    private final transient Function<String, T> reader;
    private final JLabel reason = Looks.label("");
    private transient Optional<T> value = Optional.empty();
    private boolean quiet;
    private transient Runnable onChange = () -> {};

    /**
     * A field.
     *
     * @param columns width in letters
     * @param reader reads the text, or throws an IllegalArgumentException whose message is the reason
     */
    CheckedField(String name, int columns, Function<String, T> reader) {
        super(columns);
        this.reader = reader;
        setName(name);
        setFont(Looks.text());
        setMaximumSize(getPreferredSize());
        setMinimumSize(getPreferredSize());
        reason.setForeground(Looks.WRONG);
        reason.setMinimumSize(new Dimension(0, 0));
        getDocument().addDocumentListener(new DocumentListener() {
            @Override
            public void insertUpdate(DocumentEvent e) {
                read();
            }

            @Override
            public void removeUpdate(DocumentEvent e) {
                read();
            }

            @Override
            public void changedUpdate(DocumentEvent e) {
                read();
            }
        });
        read();
    }

    /** What the text means, or empty when it is wrong. */
    Optional<T> value() {
        return value;
    }

    /** Why the text is wrong; empty when it is right. */
    String reason() {
        return reason.getText();
    }

    /** The label that says why, to be put beside the field. */
    JLabel reasonLabel() {
        return reason;
    }

    void onChange(Runnable listener) {
        onChange = listener;
    }

    /** Shows a value without telling the listener. */
    void show(String text) {
        if (!text.equals(getText())) {
            quiet = true;
            setText(text);
            quiet = false;
        }
    }

    private void read() {
        if (reason == null) {
            return;
        }
        try {
            value = Optional.of(reader.apply(getText().strip()));
            reason.setText("");
            setBackground(Color.WHITE);
        } catch (IllegalArgumentException e) {
            value = Optional.empty();
            reason.setText(isEnabled() ? e.getMessage() : "");
            setBackground(WRONG_GROUND);
        }
        reason.setToolTipText(reason.getText().isEmpty() ? null : reason.getText());
        if (!quiet) {
            onChange.run();
        }
    }
}
