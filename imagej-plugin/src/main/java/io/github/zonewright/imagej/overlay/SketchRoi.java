package io.github.zonewright.imagej.overlay;

import ij.gui.ImageCanvas;
import ij.gui.Roi;
import java.awt.Graphics;

/** Stands in an overlay for the marks of a pattern while it is dragged, and shows its sketch when ImageJ repaints the canvas. */
final class SketchRoi extends Roi {
    private static final long serialVersionUID = 1L;

    private final transient ImageCanvas canvas;
    private transient Sketch sketch;

    /** Of an image of this size; draws nothing at first. */
    SketchRoi(ImageCanvas canvas, int width, int height) {
        super(0, 0, width, height);
        this.canvas = canvas;
        setName("dragged pattern");
        setProperty(PatternOverlay.PROPERTY, MarkStyle.COMPUTED.key());
    }

    boolean isOn(ImageCanvas other) {
        return canvas == other;
    }

    /** Draws a view on the canvas. */
    void draw(PatternView view) {
        if (sketch == null || !sketch.isOf(canvas)) {
            sketch = null;
            sketch = new Sketch(canvas, view, (int) getFloatWidth(), (int) getFloatHeight());
        }
        sketch.draw(view);
    }

    @Override
    public void draw(Graphics g) {
        if (sketch != null && sketch.isOf(canvas)) {
            sketch.paint(g);
        }
    }
}
