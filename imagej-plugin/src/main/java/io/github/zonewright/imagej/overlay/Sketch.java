package io.github.zonewright.imagej.overlay;

import ij.gui.ImageCanvas;
import ij.gui.Roi;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.pattern.PlacedSpot;
import java.awt.Graphics;
import java.awt.Graphics2D;
import java.awt.Rectangle;
import java.awt.RenderingHints;
import java.awt.image.BufferedImage;
import java.awt.image.DataBufferInt;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;

/**
 * A pattern on a canvas while it is dragged. The canvas is painted once without our marks; from then on only the pixels of the
 * marks are touched, which leave their old places and are put to the new ones. The strongest of the spots that carry indices
 * when the drag begins keep them, as many as take no longer to draw than the rings.
 */
final class Sketch {
    /** So many pixels of letters and their plates are drawn at most. */
    private static final int LETTERED = 12_000;

    /** What a canvas shows. */
    private record Seen(ImageCanvas canvas, Rectangle part, double zoom, int width, int height) {
        static Seen of(ImageCanvas canvas) {
            return new Seen(
                    canvas,
                    new Rectangle(canvas.getSrcRect()),
                    canvas.getMagnification(),
                    canvas.getWidth(),
                    canvas.getHeight());
        }
    }

    /** What is on the picture: a sprite at a place, or else whatever fills a box; what is beneath is kept from an index on. */
    private record Put(Sprite sprite, int at, Rectangle box, int index) {}

    private final Seen seen;
    private final int imageWidth;
    private final int imageHeight;
    private final BufferedImage picture;
    private final int[] pixels;

    /** Draws what is not worth a sprite. */
    private final Graphics2D plane;

    private final MarkSprites sprites;
    private final Map<Hkl, Sprite> letters = new HashMap<>();
    private final List<Put> put = new ArrayList<>();
    private int[] beneath = new int[0];
    private int kept;

    /** Begins over what a canvas shows, which is to be without our marks, of an image of this size. */
    Sketch(ImageCanvas canvas, PatternView view, int imageWidth, int imageHeight) {
        this.seen = Seen.of(canvas);
        this.imageWidth = imageWidth;
        this.imageHeight = imageHeight;
        this.picture = new BufferedImage(seen.width(), seen.height(), BufferedImage.TYPE_INT_RGB);
        Graphics2D g = picture.createGraphics();
        canvas.paint(g);
        Sprite.smooth(g);
        if (view.extras().has(ShownMarks.LEGEND)) {
            double height = MarkSize.letters(Math.max(imageWidth, imageHeight), seen.zoom());
            Legend.of(view, height, seen.part()).forEach(roi -> ink(roi).draw(g));
        }
        g.dispose();
        this.pixels = ((DataBufferInt) picture.getRaster().getDataBuffer()).getData();
        this.plane = picture.createGraphics();
        this.sprites = new MarkSprites(seen.zoom(), seen.width());
        if (view.labelled()) {
            carry(SpotLabels.of(view, size(view), imageWidth, imageHeight));
        }
    }

    private void carry(List<SpotLabels.Label> labels) {
        int room = LETTERED;
        for (SpotLabels.Label label : labels) {
            Sprite sprite = sprites.letters(label.letters());
            room -= sprite.size();
            if (room < 0) {
                return;
            }
            letters.put(label.spot().spot().hkl(), sprite);
        }
    }

    /** Whether a view can be sketched on a canvas: one whose px are those of the screen. */
    static boolean isPossible(ImageCanvas canvas, PatternView view) {
        if (canvas == null || view.placement().isEmpty() || view.extras().has(ShownMarks.SPLIT)) {
            return false;
        }
        Graphics g = canvas.getGraphics();
        boolean plain = g instanceof Graphics2D plane && plane.getTransform().isIdentity();
        if (g != null) {
            g.dispose();
        }
        return plain;
    }

    /** Whether a canvas still shows what it showed when the sketch was begun. */
    boolean isOf(ImageCanvas canvas) {
        return Seen.of(canvas).equals(seen);
    }

    /** Draws a view in place of the one before, and brings it to the screen. */
    void draw(PatternView view) {
        clean();
        drawOthers(view);
        drawSpots(view);
        Graphics g = seen.canvas().getGraphics();
        if (g != null) {
            paint(g);
            g.dispose();
        }
    }

    /** Paints the picture of canvas and pattern. */
    void paint(Graphics g) {
        g.drawImage(picture, 0, 0, null);
    }

    /** The last first, since marks may cover one another. */
    private void clean() {
        for (int i = put.size() - 1; i >= 0; i--) {
            Put p = put.get(i);
            if (p.sprite() != null) {
                p.sprite().take(pixels, p.at(), beneath, p.index());
            } else {
                Rectangle box = p.box();
                for (int y = 0; y < box.height; y++) {
                    System.arraycopy(
                            beneath, p.index() + y * box.width, pixels, (box.y + y) * seen.width() + box.x, box.width);
                }
            }
        }
        put.clear();
        kept = 0;
    }

    /** Makes room for so many pixels and says from which index on. */
    private int keep(int count) {
        int index = kept;
        kept += count;
        if (kept > beneath.length) {
            beneath = Arrays.copyOf(beneath, 2 * kept);
        }
        return index;
    }

    private void drawSpots(PatternView view) {
        MarkSize size = size(view);
        Uvw zone = view.placement().orElseThrow().setting().zone();
        for (PlacedSpot spot : view.computed()) {
            Hkl hkl = spot.spot().hkl();
            double diameter = size.of(spot);
            double x = (spot.position().x() - seen.part().x) * seen.zoom();
            double y = (spot.position().y() - seen.part().y) * seen.zoom();
            int halvesX = MarkSprites.halves(x);
            int halvesY = MarkSprites.halves(y);
            put(sprites.spot(diameter, hkl.dot(zone) != 0, halvesX, halvesY), halvesX, halvesY);
        }
        if (letters.isEmpty()) {
            return;
        }
        for (PlacedSpot spot : view.computed()) {
            Sprite label = letters.get(spot.spot().hkl());
            if (label != null) {
                double below = spot.position().y() + SpotLabels.below(size.of(spot));
                put(
                        label,
                        2 * (int) Math.round((spot.position().x() - seen.part().x) * seen.zoom()),
                        2 * (int) Math.round((below - seen.part().y) * seen.zoom()));
            }
        }
    }

    private void drawOthers(PatternView view) {
        for (Roi roi : Marks.besideSpots(view, imageWidth, imageHeight, seen.zoom(), seen.part())) {
            MarkInk ink = ink(roi);
            int x = MarkSprites.halves(ink.middleX());
            int y = MarkSprites.halves(ink.middleY());
            Sprite sprite = sprites.of(ink, x, y);
            if (sprite != null) {
                put(sprite, x, y);
                continue;
            }
            Rectangle box = ink.box().intersection(new Rectangle(seen.width(), seen.height()));
            if (!box.isEmpty()) {
                put(ink, box);
            }
        }
    }

    /** Draws a mark that is not worth a sprite; long lines with hard edges, which is quick. */
    private void put(MarkInk ink, Rectangle box) {
        int index = keep(box.width * box.height);
        for (int y = 0; y < box.height; y++) {
            System.arraycopy(pixels, (box.y + y) * seen.width() + box.x, beneath, index + y * box.width, box.width);
        }
        put.add(new Put(null, 0, box, index));
        plane.setRenderingHint(
                RenderingHints.KEY_ANTIALIASING,
                ink.width() == 0 ? RenderingHints.VALUE_ANTIALIAS_ON : RenderingHints.VALUE_ANTIALIAS_OFF);
        ink.draw(plane);
    }

    /** Puts a sprite at a place in half px. */
    private void put(Sprite sprite, int halvesX, int halvesY) {
        int x = halvesX >> 1;
        int y = halvesY >> 1;
        Sprite within = sprite.within(seen.height(), x, y);
        if (within == null) {
            return;
        }
        int at = y * seen.width() + x;
        int index = keep(within.size());
        within.put(pixels, at, beneath, index);
        put.add(new Put(within, at, null, index));
    }

    private MarkInk ink(Roi roi) {
        return MarkInk.of(roi, seen.part().x, seen.part().y, seen.zoom());
    }

    private MarkSize size(PatternView view) {
        return MarkSize.of(view, imageWidth, imageHeight, seen.zoom());
    }
}
