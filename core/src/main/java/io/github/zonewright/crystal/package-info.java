/**
 * Crystals: cell, group and atoms, how strongly they scatter electrons, and their reading and writing as CIF.
 *
 * <p>A crystal comes from the shelf ({@link io.github.zonewright.crystal.CrystalShelf}), from a CIF
 * ({@link io.github.zonewright.crystal.CrystalCif}), from the folder that a user keeps
 * ({@link io.github.zonewright.crystal.CrystalFolder}), or is typed in: by structure type
 * ({@link io.github.zonewright.crystal.StructureType}) or by cell, group and sites
 * ({@link io.github.zonewright.crystal.CrystalBuilder}). Lists of candidates, such as the phases of one steel, are kept
 * beside the user's crystals ({@link io.github.zonewright.crystal.CandidateFolder}).
 *
 * <p>Scattering factors and structure factors are in Å, without the relativistic factor γ; an interaction multiplies them
 * by it.
 */
package io.github.zonewright.crystal;
