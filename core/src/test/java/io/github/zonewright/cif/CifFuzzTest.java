package io.github.zonewright.cif;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.TestData;
import java.io.ByteArrayInputStream;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Base64;
import java.util.List;
import java.util.Random;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;

/**
 * Files broken at random: each is read, or refused with a place and a reason; what is read is written so that it reads
 * the same again. {@code -Dzonewright.fuzz=1000000} makes the run longer, {@code -Dzonewright.fuzz.seed=…} another one.
 */
class CifFuzzTest {
    private static final String SMALL = """
            data_small
            _a 'it's' _b "x" # remark
            _c
            ;\\
            folded \\
            line
            ;
            _d
            ;> \\
            > one
            > ;two
            ;
            loop_ _e.f _[g] 1.25(3) ? . -.5e-3(12) 'a b' $frame
            save_frame _a . save_
            """;
    private static final String SECOND = """
            #\\#CIF_2.0
            data_two
            _a [1 2 [3 'x'] {'k':'v' "l":[?]}]
            _b '''triple "quoted"
            ' text'''
            _c {'a b':
            ;text
            ; '''c''':.}
            loop_ _d _e [1] {} a "b"
            """;
    private static final List<String> PIECES = List.of(
            "\n;",
            "\n;\\\n",
            "\\\n",
            "'",
            "\"",
            "'''",
            "\"\"\"",
            "loop_ ",
            "data_",
            "save_",
            "save_x ",
            "global_ ",
            "stop_ ",
            "_",
            "_a ",
            "#",
            "?",
            ".",
            "[",
            "]",
            "{",
            "}",
            ":",
            "\r",
            "\r\n",
            "\t",
            " ",
            "\n",
            "\0",
            "\u000B",
            "\u001A",
            "#\\#CIF_2.0\n",
            "\uFEFF",
            "é",
            "𝐀",
            "$",
            "(",
            ")",
            "e9",
            "1e999(9)",
            "> \\\n> ",
            "[[[[[[[[",
            "{'a':",
            "\\\\\n");

    private final Random random = new Random(Long.getLong("zonewright.fuzz.seed", 20261201L));

    private static List<byte[]> seeds() throws IOException {
        List<byte[]> seeds = new ArrayList<>();
        seeds.add(SMALL.getBytes(StandardCharsets.UTF_8));
        seeds.add(SECOND.getBytes(StandardCharsets.UTF_8));
        seeds.add(("\uFEFF" + SMALL).getBytes(StandardCharsets.UTF_16LE));
        try (Stream<Path> paths = Files.list(TestData.path("cif"))) {
            for (Path path :
                    paths.sorted().filter(p -> p.toString().endsWith(".cif")).toList()) {
                seeds.add(Files.readAllBytes(path));
            }
        }
        return seeds;
    }

    @Test
    void brokenFiles_areReadOrRefused() throws IOException {
        List<byte[]> seeds = seeds();
        int inputs = Integer.getInteger("zonewright.fuzz", 5000);
        int read = 0;
        for (int i = 0; i < inputs; i++) {
            byte[] input = mutated(seeds);
            try {
                read += accepted(input) ? 1 : 0;
            } catch (IOException | RuntimeException | StackOverflowError | AssertionError e) {
                throw new AssertionError(
                        "input " + i + ": " + Base64.getEncoder().encodeToString(input), e);
            }
        }
        assertTrue(read > inputs / 20, "too few of the inputs are still CIFs for the test to mean much: " + read);
        assertTrue(read < inputs * 19 / 20, "too few of the inputs are broken for the test to mean much: " + read);
    }

    private static boolean accepted(byte[] input) throws IOException {
        CifFile file;
        try {
            file = CifFile.read(new ByteArrayInputStream(input));
        } catch (CifSyntaxException e) {
            assertTrue(e.line() > 0 && e.column() > 0 && !e.reason().isEmpty());
            return false;
        }
        CifFile again = CifFile.parse(file.toText());
        assertEquals(described(file), described(again));
        assertEquals(file.toText(), again.toText());
        assertEquals(
                List.of(),
                again.notices().stream()
                        .filter(n -> n.message().contains("quoted"))
                        .toList());
        return true;
    }

    /** All that a file must keep, and every number in it. Comments run on, as one too long for a line becomes two. */
    private static String described(CifFile file) {
        StringBuilder text = new StringBuilder(String.join("", file.heading()));
        file.blocks().forEach(block -> describe(block, text));
        return text.toString();
    }

    private static void describe(CifEntry entry, StringBuilder text) {
        if (entry instanceof CifBlock block) {
            text.append("block ").append(block.name());
            block.entries().forEach(inner -> describe(inner, text));
        } else if (entry instanceof CifItem item) {
            text.append(item.tag());
            describe(item.value(), text);
        } else if (entry instanceof CifLoop loop) {
            text.append(loop.tags());
            loop.rows().forEach(row -> row.forEach(value -> describe(value, text)));
        } else if (entry instanceof CifComment comment) {
            text.append(comment.text());
        }
    }

    private static void describe(CifValue value, StringBuilder text) {
        text.append('|').append(value.text()).append('|').append(value.isKnown());
        try {
            text.append(value.asNumber()).append(value.asInt());
        } catch (CifValueException e) {
            text.append(e.reason());
        }
        value.elements().forEach(element -> describe(element, text));
    }

    private byte[] mutated(List<byte[]> seeds) {
        byte[] bytes = seeds.get(random.nextInt(2) == 0 ? random.nextInt(3) : random.nextInt(seeds.size()));
        int changes = 1 + random.nextInt(4);
        for (int i = 0; i < changes; i++) {
            bytes = changed(bytes, seeds);
        }
        return bytes;
    }

    private byte[] changed(byte[] bytes, List<byte[]> seeds) {
        int from = random.nextInt(bytes.length + 1);
        int to = Math.min(bytes.length, from + random.nextInt(1 + random.nextInt(40)));
        return switch (random.nextInt(8)) {
            case 0 -> Arrays.copyOf(bytes, from);
            case 1 -> joined(bytes, from, to, new byte[0]);
            case 2 -> joined(bytes, from, from, Arrays.copyOfRange(bytes, from, to));
            case 3 -> joined(bytes, from, Math.min(bytes.length, from + 1), new byte[] {(byte) random.nextInt(256)});
            case 4 -> joined(bytes, from, from, slice(seeds.get(random.nextInt(seeds.size()))));
            case 5 -> joined(bytes, from, to, piece());
            default -> joined(bytes, from, from, piece());
        };
    }

    private byte[] piece() {
        byte[] piece = PIECES.get(random.nextInt(PIECES.size())).getBytes(StandardCharsets.UTF_8);
        return random.nextInt(100) == 0
                ? joined(new byte[0], 0, 0, "x;\\".repeat(900).getBytes(StandardCharsets.UTF_8))
                : piece;
    }

    private byte[] slice(byte[] bytes) {
        int from = random.nextInt(bytes.length);
        return Arrays.copyOfRange(bytes, from, Math.min(bytes.length, from + random.nextInt(300)));
    }

    private static byte[] joined(byte[] bytes, int from, int to, byte[] middle) {
        ByteArrayOutputStream out = new ByteArrayOutputStream();
        out.write(bytes, 0, from);
        out.writeBytes(middle);
        out.write(bytes, to, bytes.length - to);
        return out.toByteArray();
    }
}
