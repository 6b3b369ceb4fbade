package io.github.zonewright.document;

import java.io.ByteArrayInputStream;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.List;
import javax.xml.parsers.DocumentBuilderFactory;
import org.w3c.dom.Document;
import org.w3c.dom.Element;
import org.w3c.dom.NodeList;

/** Pages read back by the XML parser of the JDK. */
final class Pages {
    private Pages() {}

    static Document parse(String html) throws Exception {
        DocumentBuilderFactory factory = DocumentBuilderFactory.newInstance();
        factory.setNamespaceAware(true);
        return factory.newDocumentBuilder().parse(new ByteArrayInputStream(html.getBytes(StandardCharsets.UTF_8)));
    }

    static List<Element> all(Document page, String tag) {
        return elements(page.getElementsByTagNameNS("*", tag));
    }

    static List<Element> all(Element in, String tag) {
        return elements(in.getElementsByTagNameNS("*", tag));
    }

    private static List<Element> elements(NodeList found) {
        List<Element> elements = new ArrayList<>();
        for (int i = 0; i < found.getLength(); i++) {
            elements.add((Element) found.item(i));
        }
        return elements;
    }
}
