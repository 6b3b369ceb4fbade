package io.github.zonewright.image;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.Random;
import org.junit.jupiter.api.Test;

class PackedMaskTest {

    /** Every pixel of random masks, and of the empty and the full one, and places outside. */
    @Test
    void contains_asTheMaskDoes() {
        Random random = new Random(3);
        for (double share : new double[] {0, 0.03, 0.5, 0.97, 1}) {
            Mask mask = Mask.of(17, 11, i -> random.nextDouble() < share);
            PackedMask packed = PackedMask.of(mask);
            for (int row = -1; row <= 11; row++) {
                for (int column = -1; column <= 17; column++) {
                    assertEquals(mask.contains(column, row), packed.contains(column, row));
                    PixelPoint point = new PixelPoint(column + 0.3, row + 0.9);
                    assertEquals(mask.contains(point), packed.contains(point));
                }
            }
        }
    }
}
