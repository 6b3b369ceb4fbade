/**
 * Crystals: cell, group and atoms, how strongly they scatter electrons, and their reading and writing as CIF.
 *
 * <p>Scattering factors and structure factors are in Å, without the relativistic factor γ; an interaction multiplies them
 * by it.
 */
package io.github.zonewright.crystal;
