package io.github.zonewright.imagej.overlay;

import java.awt.Graphics2D;
import java.awt.Rectangle;
import java.awt.RenderingHints;
import java.awt.geom.AffineTransform;
import java.awt.image.BufferedImage;
import java.awt.image.DataBufferInt;
import java.util.Arrays;
import java.util.function.Consumer;
import java.util.function.IntUnaryOperator;
import java.util.stream.IntStream;

/**
 * A small drawing, made once to be put down many times: only the pixels that it covers. A drawing call of Java 2D takes as long
 * for a mark of 15 px as a thousand of its pixels. Pictures are in red, green and blue of 8 bit each.
 */
final class Sprite {
    private static final int OPAQUE = 255;

    private final Rectangle box;
    private final int width;
    private final int[] columns;

    /** Of each pixel: where it is in a picture of the width that this is for, from the place where the sprite is put. */
    private final int[] places;

    /** Of each pixel: its colour times how much it covers, and in the highest 8 bit what is left of what is beneath, of 256. */
    private final int[] colours;

    private Sprite(Rectangle box, int width, int[] columns, int[] places, int[] colours) {
        this.box = box;
        this.width = width;
        this.columns = columns;
        this.places = places;
        this.colours = colours;
    }

    /** Whatever is drawn within a box, in px about the place where the sprite will be put, on pictures of this width. */
    static Sprite of(Rectangle box, int width, Consumer<Graphics2D> drawing) {
        BufferedImage sheet = new BufferedImage(box.width, box.height, BufferedImage.TYPE_INT_ARGB_PRE);
        Graphics2D g = sheet.createGraphics();
        smooth(g);
        g.transform(AffineTransform.getTranslateInstance(-box.x, -box.y));
        drawing.accept(g);
        g.dispose();
        int[] pixels = ((DataBufferInt) sheet.getRaster().getDataBuffer()).getData();
        int[] seen = IntStream.range(0, pixels.length)
                .filter(i -> pixels[i] >>> 24 > 0)
                .toArray();
        int[] columns = map(seen, i -> box.x + i % box.width);
        int[] places = map(seen, i -> (box.y + i / box.width) * width + box.x + i % box.width);
        int[] colours = map(seen, i -> pixels[i] & 0xffffff | OPAQUE - (pixels[i] >>> 24) << 24);
        return new Sprite(box, width, columns, places, colours);
    }

    private static int[] map(int[] indices, IntUnaryOperator value) {
        return IntStream.of(indices).map(value).toArray();
    }

    /** How drawings are made smooth, as ImageJ makes its overlays. */
    static void smooth(Graphics2D g) {
        g.setRenderingHint(RenderingHints.KEY_ANTIALIASING, RenderingHints.VALUE_ANTIALIAS_ON);
        g.setRenderingHint(RenderingHints.KEY_STROKE_CONTROL, RenderingHints.VALUE_STROKE_PURE);
    }

    /** How many pixels it covers. */
    int size() {
        return places.length;
    }

    /** What of it is on a picture of this height when it is put there: itself as a rule, and null when nothing is. */
    Sprite within(int height, int x, int y) {
        Rectangle picture = new Rectangle(-x, -y, width, height);
        if (picture.contains(box)) {
            return this;
        }
        Rectangle rest = box.intersection(picture);
        if (rest.isEmpty()) {
            return null;
        }
        int[] shownColumns = new int[places.length];
        int[] shownPlaces = new int[places.length];
        int[] shownColours = new int[places.length];
        int n = 0;
        for (int i = 0; i < places.length; i++) {
            if (rest.contains(columns[i], (places[i] - columns[i]) / width)) {
                shownColumns[n] = columns[i];
                shownPlaces[n] = places[i];
                shownColours[n++] = colours[i];
            }
        }
        return new Sprite(
                rest,
                width,
                Arrays.copyOf(shownColumns, n),
                Arrays.copyOf(shownPlaces, n),
                Arrays.copyOf(shownColours, n));
    }

    /** Puts it on a picture, on which all of it is, and keeps what was beneath from an index on. */
    void put(int[] picture, int at, int[] beneath, int index) {
        for (int i = 0; i < places.length; i++) {
            int place = at + places[i];
            int ground = picture[place];
            int colour = colours[i];
            int rest = colour >>> 24;
            beneath[index + i] = ground;
            picture[place] = (colour & 0xffffff)
                    + (((ground & 0xff00ff) * rest >>> 8) & 0xff00ff)
                    + (((ground & 0xff00) * rest >>> 8) & 0xff00);
        }
    }

    /** Puts back what was beneath. */
    void take(int[] picture, int at, int[] beneath, int index) {
        for (int i = 0; i < places.length; i++) {
            picture[at + places[i]] = beneath[index + i];
        }
    }
}
