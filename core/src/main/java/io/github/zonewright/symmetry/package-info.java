/**
 * Symmetry operations and space groups in any setting, generated from Hall symbols or taken from a list of operations.
 *
 * <p>An operation (W, w) takes a point x of fractional coordinates to W·x + w. Reflections are row vectors: h goes to
 * h·W. Translations are kept exactly, in fractions of a cell edge.
 */
package io.github.zonewright.symmetry;
