package io.github.zonewright.imagej.overlay;

import ij.gui.Roi;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotNet;
import java.util.Optional;

/**
 * What was measured, to be drawn before any crystal is known.
 *
 * @param pattern spots and centre
 * @param net their net or row
 * @param hidden outline of the area behind the stop
 */
public record MeasuredView(MeasuredPattern pattern, SpotNet net, Optional<Roi> hidden) {}
