package io.github.zonewright.symmetry;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class SpaceGroupsTest {

    /** Spellings in use in papers and databases; which setting each is, by International Tables A. */
    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            quoteCharacter = '`',
            value = {
                "225 | F m -3 m",
                "Fm-3m | F m -3 m",
                "Fm3m | F m -3 m",
                "F m 3 m | F m -3 m",
                "F 4/m -3 2/m | F m -3 m",
                "F 4/m 3 2/m | F m -3 m",
                "-F 4 2 3 | F m -3 m",
                "Fd3m | F d -3 m:2",
                "F d -3 m | F d -3 m:2",
                "Fd-3m:1 | F d -3 m:1",
                "F d -3 m :1 | F d -3 m:1",
                "F d -3 m S | F d -3 m:1",
                "Fd-3mZ | F d -3 m:2",
                "F d 3 m (origin choice 1) | F d -3 m:1",
                "F 41/d -3 2/m | F d -3 m:2",
                "227:1 | F d -3 m:1",
                "Ia3d | I a -3 d",
                "Pa3 | P a -3",
                "Im3m | I m -3 m",
                "P n 3 n:1 | P n -3 n:1",
                "R -3 c | R -3 c:H",
                "R-3c | R -3 c:H",
                "R -3 c {rhombohedral axes} | R -3 c:R",
                "R 3 c {rhombohedral axes} | R 3 c:R",
                "R -3 c {hexagonal axes} | R -3 c:H",
                "R -3 c R | R -3 c:R",
                "R-3mH | R -3 m:H",
                "R -3 2/m | R -3 m:H",
                "R-3m:r | R -3 m:R",
                "167:h | R -3 c:H",
                "P 21/c | P 1 21/c 1",
                "P21/c | P 1 21/c 1",
                "P2_1/c | P 1 21/c 1",
                "P2(1)/c | P 1 21/c 1",
                "P 1 21/c 1 | P 1 21/c 1",
                "P 21/n | P 1 21/n 1",
                "P 21/b | P 1 1 21/b",
                "P 1 1 21/b | P 1 1 21/b",
                "14:c1 | P 1 1 21/a",
                "C 2/c | C 1 2/c 1",
                "I 2/a | I 1 2/a 1",
                "15:b3 | I 1 2/a 1",
                "15:-b3 | I 1 2/c 1",
                "B 2/b | B 1 1 2/b",
                "C2 | C 1 2 1",
                "Pm | P 1 m 1",
                "Pnma | P n m a",
                "P 21/n 21/m 21/a | P n m a",
                "Pbnm | P b n m",
                "62:cab | P b n m",
                "P n m a:cab | P b n m",
                "P 2/m 2/m 2/m | P m m m",
                "P2/m2/m2/m | P m m m",
                "Cmce | C m c a",
                "C m c a | C m c a",
                "Aem2 | A b m 2",
                "A e a 2 | A b a 2",
                "C m m e | C m m a",
                "C c c e:1 | C c c a:1",
                "50:2cab | P n c b:2",
                "P 4/n m m:2 | P 4/n m m:2",
                "P4/nmm | P 4/n m m:2",
                "I41/amd | I 41/a m d:2",
                "I 4/m 2/m 2/m | I 4/m m m",
                "P42/mnm | P 42/m n m",
                "P63/mmc | P 63/m m c",
                "P 63/m 2/m 2/c | P 63/m m c",
                "P6_3mc | P 63 m c",
                "P3221 | P 32 2 1",
                "P 31 1 2 | P 31 1 2",
                "P -3 2/m 1 | P -3 m 1",
                "P-1 | P -1",
                "P\u22121 | P -1",
                "P 1\u0305 | P -1",
                "P 2 2 2 | P 2 2 2"
            })
    void find_spellingsInUse(String written, String setting) {
        assertEquals(setting, SpaceGroups.find(written).orElseThrow().hermannMauguin());
    }

    @ParameterizedTest
    @ValueSource(
            strings = {"", " ", "Q m 3 m", "231", "0", "F m -3 m:7", "P 21/c:cab", "hello", ":", "R -3 c {", "1e9"})
    void find_unknown(String written) {
        assertTrue(SpaceGroups.find(written).isEmpty());
    }

    /** A bare symbol of a type with two origins leaves both open. */
    @Test
    void candidates_givesEverySettingOfABareSymbol() {
        List<String> found = SpaceGroups.candidates("F d -3 m").stream()
                .map(SpaceGroupSetting::qualifier)
                .toList();
        assertEquals(List.of("2", "1"), found);
        assertEquals(
                List.of("H", "R"),
                SpaceGroups.candidates("R 3 c").stream()
                        .map(SpaceGroupSetting::qualifier)
                        .toList());
        assertEquals(2, SpaceGroups.candidates("C c c e:2").size());
    }

    /** Codes of the CIF core dictionary's _space_group.IT_coordinate_system_code. */
    @ParameterizedTest
    @CsvSource({
        "P 1 2 1,b", "P 1 1 2,c", "P 2 1 1,a", "P 1 21/n 1,b2", "B 1 1 2/b,-c1", "P c m 21,ba-c", "A 21 2 2,cab",
        "P n c b:1,1cab", "A b a a:2,2cab", "P a -3,''", "R 3:R,r", "P b c a,abc", "P c a b,ba-c", "F d d d:1,1"
    })
    void coordinateCode_followsTheDictionary(String symbol, String code) {
        assertEquals(code, SpaceGroups.find(symbol).orElseThrow().coordinateCode());
    }

    @Test
    void byHall_findsAGroupSpeltInAnotherWay() {
        assertEquals(
                "P n n n:2",
                SpaceGroups.byHall("P 2 2 -1n (3 3 3)").orElseThrow().hermannMauguin());
        assertTrue(SpaceGroups.byHall("nonsense").isEmpty());
        assertTrue(SpaceGroups.byHall("P 2 (1 0 0)").isEmpty(), "a twofold axis off the origin is not tabulated");
    }

    @Test
    void settings_refusesANumberOutOfRange() {
        assertThrows(IllegalArgumentException.class, () -> SpaceGroups.settings(231));
        assertThrows(IllegalArgumentException.class, () -> SpaceGroups.standard(0));
    }
}
