package io.github.zonewright.imagej.workbench;

import java.util.List;
import java.util.stream.Collectors;
import javax.swing.JEditorPane;
import javax.swing.text.html.HTMLEditorKit;

/** Sentences that wrap, and that can be marked and copied. */
final class Words extends JEditorPane {
    private static final long serialVersionUID = 1L;

    Words(String name) {
        setName(name);
        setEditable(false);
        setEditorKit(new HTMLEditorKit());
        putClientProperty(HONOR_DISPLAY_PROPERTIES, true);
        setFont(Looks.text());
        setOpaque(false);
    }

    /** Shows sentences, each a paragraph of its own. */
    void say(List<String> sentences) {
        setText(sentences.stream()
                .map(s -> "<p style='margin-top:0;margin-bottom:5px'>"
                        + s.replace("&", "&amp;").replace("<", "&lt;") + "</p>")
                .collect(Collectors.joining("", "<html><body>", "</body></html>")));
        setCaretPosition(0);
    }
}
