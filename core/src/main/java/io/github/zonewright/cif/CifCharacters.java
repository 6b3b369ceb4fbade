package io.github.zonewright.cif;

import java.nio.ByteBuffer;
import java.nio.charset.CharacterCodingException;
import java.nio.charset.Charset;
import java.nio.charset.StandardCharsets;

/** The characters of a CIF: from bytes to text, line ends, and which characters may stand in it. */
final class CifCharacters {
    private CifCharacters() {}

    /**
     * Bytes to text: a byte order mark decides (UTF-8, UTF-16), else UTF-8, else ISO 8859-1, in which every byte means
     * something.
     */
    static String decode(byte[] bytes) {
        if (startsWith(bytes, 0xEF, 0xBB, 0xBF)) {
            return decode(bytes, 3, StandardCharsets.UTF_8);
        }
        if (startsWith(bytes, 0xFE, 0xFF)) {
            return decode(bytes, 2, StandardCharsets.UTF_16BE);
        }
        if (startsWith(bytes, 0xFF, 0xFE)) {
            return decode(bytes, 2, StandardCharsets.UTF_16LE);
        }
        return decode(bytes, 0, StandardCharsets.UTF_8);
    }

    private static String decode(byte[] bytes, int skip, Charset charset) {
        try {
            return charset.newDecoder()
                    .decode(ByteBuffer.wrap(bytes, skip, bytes.length - skip))
                    .toString();
        } catch (CharacterCodingException e) {
            if (charset.equals(StandardCharsets.UTF_8)) {
                return new String(bytes, skip, bytes.length - skip, StandardCharsets.ISO_8859_1);
            }
            throw new CifSyntaxException(1, 1, "", "the file begins as " + charset + " but is not valid " + charset);
        }
    }

    private static boolean startsWith(byte[] bytes, int... mark) {
        if (bytes.length < mark.length) {
            return false;
        }
        for (int i = 0; i < mark.length; i++) {
            if ((bytes[i] & 0xFF) != mark[i]) {
                return false;
            }
        }
        return true;
    }

    /** CRLF and CR as LF. */
    static String unifyLineEnds(String text) {
        return text.indexOf('\r') < 0 ? text : text.replace("\r\n", "\n").replace('\r', '\n');
    }

    static boolean isBlank(char c) {
        return c == ' ' || c == '\t' || c == '\n';
    }

    /**
     * Where a character stands that no CIF can hold: a control character other than HT and LF, or half a surrogate
     * pair. Vertical tab and form feed are among them (International Tables G, 2.2.7).
     *
     * @return the index, or −1
     */
    static int firstForbidden(String text) {
        for (int i = 0; i < text.length(); i++) {
            char c = text.charAt(i);
            if (c < ' ' ? c != '\n' && c != '\t' : c == 0x7F) {
                return i;
            }
            if (Character.isSurrogate(c)) {
                boolean pair = i + 1 < text.length() && Character.isSurrogatePair(c, text.charAt(i + 1));
                if (!pair) {
                    return i;
                }
                i++;
            }
        }
        return -1;
    }

    static String name(char c) {
        return String.format("U+%04X", (int) c);
    }

    static void requireWritable(String text, String what) {
        int bad = firstForbidden(text);
        if (bad >= 0) {
            throw new IllegalArgumentException(
                    "a " + what + " cannot hold the character " + name(text.charAt(bad)) + ", found at index " + bad);
        }
    }

    static void requireTag(String tag) {
        if (tag.length() < 2 || tag.charAt(0) != '_') {
            throw new IllegalArgumentException(
                    "a data name is '_' and at least one character, but this is '" + tag + "'");
        }
        requireWord(tag, "data name");
    }

    static void requireWord(String word, String what) {
        requireWritable(word, what);
        for (int i = 0; i < word.length(); i++) {
            if (isBlank(word.charAt(i))) {
                throw new IllegalArgumentException("a " + what + " has no white space, but this has: '" + word + "'");
            }
        }
    }
}
