package io.github.zonewright.document;

import java.util.function.Consumer;

/**
 * A page for screen and paper in one file: HTML that fetches nothing, runs nothing and takes its letters from the reader's
 * machine.
 */
final class Sheet {
    /** Nothing but what stands in the file itself; a text that slipped through as a script would not run. */
    private static final String POLICY = "default-src 'none'; img-src data:; style-src 'unsafe-inline'";

    private static final String COMMON = """
            html { background: #fff; color: #000; }
            body { font: 8.2pt/1.3 "Helvetica Neue", Helvetica, Arial, "Liberation Sans", "DejaVu Sans", sans-serif;
              margin: 0 auto; padding: 6mm 4mm; max-width: 186mm; }
            h1 { font-size: 13pt; line-height: 1.15; margin: 0; }
            h2 { font-size: 9.5pt; margin: 0 0 .6mm; border-bottom: .3mm solid #000; }
            p { margin: 0 0 1mm; }
            .bar { display: inline-block; line-height: 1; padding-top: .03em; border-top: .08em solid; }
            .unseen { position: absolute; width: 1px; height: 1px; overflow: hidden; clip-path: inset(50%); }
            .indices { white-space: nowrap; }
            .quiet { color: #444; }
            @page { margin: 9mm 12mm; }
            @media print { body { padding: 0; max-width: none; } }
            """;

    private Sheet() {}

    static String of(String title, String style, Consumer<Markup> body) {
        Markup out = new Markup();
        out.open("html", "xmlns", "http://www.w3.org/1999/xhtml", "lang", "en", "xml:lang", "en");
        out.line().open("head").empty("meta", "charset", "utf-8");
        out.empty("meta", "http-equiv", "Content-Security-Policy", "content", POLICY);
        out.empty("meta", "name", "viewport", "content", "width=device-width, initial-scale=1");
        out.element("title", title).line();
        out.style(COMMON + style);
        out.close().line().open("body").line();
        body.accept(out);
        out.close().close().line();
        return "<!DOCTYPE html>\n" + out;
    }
}
