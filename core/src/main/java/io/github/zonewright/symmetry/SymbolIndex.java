package io.github.zonewright.symmetry;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/** Hermann–Mauguin symbols in all the spellings in use, each with the settings it can mean. */
final class SymbolIndex {

    private static final Pattern CUBIC = Pattern.compile("([pfi])(.*[a-z])-3(.*)");
    private static final Pattern MONOCLINIC = Pattern.compile("(?:1 )*(\\S+?)(?: 1)*");
    private static final Pattern FULL_SPACELESS = Pattern.compile("[pabcfi](21?/[a-z]){3}");
    private static final Pattern ORIGIN_WORDS =
            Pattern.compile("[({\\[]?\\s*origin\\s*(?:choice|at|no\\.?)?\\s*([12])\\s*[)}\\]]?");
    private static final Pattern AXES_WORDS =
            Pattern.compile("[({\\[]?\\s*(rhombohedral|hexagonal)\\s+axes\\s*[)}\\]]?");
    private static final Map<String, String> LAST_LETTERS = Map.of("h", "h", "r", "r", "s", "1", "z", "2");

    private static final int LONGEST_SYMBOL = 100;

    private final Map<Integer, List<SpaceGroupSetting>> byNumber = new HashMap<>();
    private final Map<String, List<SpaceGroupSetting>> byKey = new HashMap<>();

    SymbolIndex(List<SpaceGroupSetting> settings) {
        Map<String, List<SpaceGroupSetting>> shortForms = new HashMap<>();
        Map<String, List<SpaceGroupSetting>> oldForms = new HashMap<>();
        Map<String, List<SpaceGroupSetting>> doubleGlides = new HashMap<>();
        for (SpaceGroupSetting setting : settings) {
            add(byNumber, setting.number(), setting);
            String bare = setting.bareSymbol();
            add(byKey, key(bare), setting);
            if (setting.number() >= 3 && setting.number() <= 15) {
                Matcher m = MONOCLINIC.matcher(bare.substring(2));
                if (m.matches()) {
                    add(shortForms, key(bare.charAt(0) + m.group(1)), setting);
                }
            }
            Matcher cubic = CUBIC.matcher(key(bare));
            if (setting.number() >= 195 && cubic.matches()) {
                add(oldForms, cubic.group(1) + cubic.group(2) + "3" + cubic.group(3), setting);
            }
            if (List.of(39, 41, 64, 67, 68).contains(setting.number())) {
                add(doubleGlides, key(doubleGlide(bare)), setting);
            }
        }
        for (Map<String, List<SpaceGroupSetting>> aliases : List.of(shortForms, oldForms, doubleGlides)) {
            aliases.forEach(byKey::putIfAbsent);
        }
        byNumber.replaceAll((n, list) -> SpaceGroups.byPreference(list));
        byKey.replaceAll((k, list) -> SpaceGroups.byPreference(list));
    }

    private static <K> void add(Map<K, List<SpaceGroupSetting>> map, K key, SpaceGroupSetting setting) {
        map.computeIfAbsent(key, k -> new ArrayList<>()).add(setting);
    }

    /** The symbol of International Tables since 1992, with e for the double glide plane normal to the centring axis. */
    private static String doubleGlide(String symbol) {
        String[] parts = symbol.split(" ");
        parts[1 + "ABC".indexOf(parts[0])] = "e";
        return String.join(" ", parts);
    }

    List<SpaceGroupSetting> ofNumber(int number) {
        return byNumber.getOrDefault(number, List.of());
    }

    List<SpaceGroupSetting> candidates(String symbol) {
        if (symbol.length() > LONGEST_SYMBOL) {
            return List.of();
        }
        String text = tidy(symbol);
        String qualifier = "";
        for (Pattern words : List.of(ORIGIN_WORDS, AXES_WORDS)) {
            Matcher m = words.matcher(text);
            if (m.find()) {
                qualifier = m.group(1).substring(0, 1);
                text = m.replaceFirst("").trim();
            }
        }
        int colon = text.indexOf(':');
        if (colon >= 0) {
            qualifier = key(text.substring(colon + 1));
            text = text.substring(0, colon).trim();
        }
        List<SpaceGroupSetting> found = lookUp(text);
        if (found.isEmpty() && qualifier.isEmpty() && text.length() > 2) {
            String last = text.substring(text.length() - 1);
            if (LAST_LETTERS.containsKey(last)) {
                qualifier = LAST_LETTERS.get(last);
                found = lookUp(text.substring(0, text.length() - 1).trim());
            }
        }
        return qualifier.isEmpty() ? found : qualified(found, LAST_LETTERS.getOrDefault(qualifier, qualifier));
    }

    private List<SpaceGroupSetting> qualified(List<SpaceGroupSetting> found, String qualifier) {
        List<SpaceGroupSetting> direct = found.stream()
                .filter(s -> s.qualifier().equalsIgnoreCase(qualifier))
                .toList();
        if (!direct.isEmpty()) {
            return direct;
        }
        return found.stream()
                .map(SpaceGroupSetting::number)
                .distinct()
                .flatMap(n -> ofNumber(n).stream())
                .filter(s -> s.coordinateCode().equals(qualifier))
                .toList();
    }

    private List<SpaceGroupSetting> lookUp(String text) {
        if (text.matches("\\d{1,3}")) {
            return ofNumber(Integer.parseInt(text));
        }
        List<SpaceGroupSetting> found = byKey.getOrDefault(key(text), List.of());
        return found.isEmpty() ? byKey.getOrDefault(key(shortened(text)), List.of()) : found;
    }

    /** The short symbol of a full one: P 2/m 2/m 2/m to P m m m, F 4/m -3 2/m to F m -3 m. */
    private static String shortened(String text) {
        String[] parts = text.split(" ");
        if (parts.length == 1) {
            return FULL_SPACELESS.matcher(text).matches() ? text.replaceAll("21?/", "") : text;
        }
        boolean cubic = parts.length >= 3 && parts[2].matches("-?3");
        for (int i = 1; i < parts.length; i++) {
            parts[i] = parts[i].replaceFirst(cubic && i == 1 ? "^[24][1-3]?/" : "^21?/", "");
        }
        return String.join(" ", parts);
    }

    private static String tidy(String symbol) {
        return symbol.toLowerCase(Locale.ROOT)
                .replaceAll("[\\u2010-\\u2015\\u2212]", "-")
                .replaceAll("([1346])\\u0305", "-$1")
                .replaceAll("\\(([1-5])\\)", "$1")
                .replace('_', ' ')
                .trim()
                .replaceAll("\\s+", " ");
    }

    private static String key(String text) {
        return text.toLowerCase(Locale.ROOT).replace(" ", "");
    }
}
