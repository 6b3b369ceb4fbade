package io.github.zonewright.crystal;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class SiteLabelTest {

    /** Type symbols and labels as files have them. */
    @ParameterizedTest
    @CsvSource({
        "Fe3+,Fe,true", "O2-,O,true", "Fe,Fe,false", "Fe1,Fe,false", "Al1,Al,false", "CaM1,Ca,false", "SiT2,Si,false",
        "O1,O,false", "OH,O,false", "OA2,O,false", "D,H,false", "D1,H,false", "Dy1,Dy,false", "Wat,O,false",
        "Wat12,O,false", "W1,W,false", "KM,K,false", "FE2+,Fe,true", "CU1,C,false", "CU,Cu,false", "Na+,Na,true",
        "Ow1,O,false", "(Fe),Fe,false", "Cl1-,Cl,true", "Yb,Yb,false", "Y1,Y,false", "U1,U,false", "H+,H,true"
    })
    void parse_elementAndCharge(String text, String symbol, boolean ion) {
        SiteLabel label = SiteLabel.parse(text);
        assertEquals(symbol, label.element().orElseThrow().symbol());
        assertEquals(ion, label.ion());
    }

    @ParameterizedTest
    @CsvSource({"M1", "X", "Va", "Vac1", "123", "''", "?", "Qq2"})
    void parse_noElement(String text) {
        assertEquals(true, SiteLabel.parse(text).element().isEmpty(), text);
    }

    @ParameterizedTest
    @CsvSource({"D,true,false", "D12,true,false", "Dy,false,false", "H,false,false", "Wat1,false,true", "O,false,false"
    })
    void parse_deuteriumAndWater(String text, boolean deuterium, boolean water) {
        assertEquals(deuterium, SiteLabel.parse(text).deuterium());
        assertEquals(water, SiteLabel.parse(text).water());
    }
}
