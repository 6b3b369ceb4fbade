package io.github.zonewright.image;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.BitSet;
import java.util.Random;
import org.junit.jupiter.api.Test;

class MaskTest {

    @Test
    void rectanglesHoldWhatTheirPixelsHold() {
        Random random = new Random(3);
        for (int trial = 0; trial < 500; trial++) {
            int every = 1 + random.nextInt(40);
            Mask mask = Mask.of(13, 9, index -> random.nextInt(every) == 0 && every < 38);
            int left = random.nextInt(20) - 4;
            int top = random.nextInt(15) - 4;
            int right = left + random.nextInt(6);
            int bottom = top + random.nextInt(6);
            boolean any = false;
            for (int row = top; row < bottom; row++) {
                for (int column = left; column < right; column++) {
                    any |= mask.contains(column, row);
                }
            }
            assertEquals(any, mask.containsAny(left, top, right, bottom));
        }
    }

    @Test
    void setsAreCopiedAndMustFitTheFrame() {
        BitSet set = new BitSet();
        set.set(7);
        Mask mask = Mask.of(4, 2, set);
        set.clear();
        assertTrue(mask.contains(3, 1));
        assertFalse(mask.contains(2, 1));
        set.set(8);
        String message = assertThrows(IllegalArgumentException.class, () -> Mask.of(4, 2, set))
                .getMessage();
        assertTrue(message.contains("8") && message.contains("4 × 2"), message);
    }
}
