package io.github.zonewright.imagej.overlay;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import java.awt.geom.Rectangle2D;
import org.junit.jupiter.api.Test;

class IndexLabelTest {
    @Test
    void of_negative_hasBar() {
        assertEquals("11\u03051", IndexLabel.of(new Hkl(1, -1, 1)));
    }

    @Test
    void of_twoDigits_areApartAndEachBarred() {
        assertEquals("1\u03052\u0305 0 3", IndexLabel.of(new Hkl(-12, 0, 3)));
    }

    @Test
    void of_zone_isInBrackets() {
        assertEquals("[1\u030510]", IndexLabel.of(new Uvw(-1, 1, 0)));
    }

    @Test
    void shape_digitsHaveTheHeightAskedFor() {
        Rectangle2D plain = IndexShape.of(new int[] {0, 0, 0}, 10).getBounds2D();
        assertEquals(10, plain.getHeight(), 0.3);
    }

    @Test
    void shape_bar_standsAboveTheDigits() {
        Rectangle2D plain = IndexShape.of(new int[] {2, 2, 2}, 10).getBounds2D();
        Rectangle2D barred = IndexShape.of(new int[] {2, -2, 2}, 10).getBounds2D();
        assertTrue(barred.getMinY() < plain.getMinY() - 2, barred + " " + plain);
        assertEquals(plain.getWidth(), barred.getWidth(), 1e-6);
    }
}
