/**
 * The Crystallographic Information File: its syntax, read and written, with no crystallography.
 *
 * <p>{@link io.github.zonewright.cif.CifFile} reads CIF 1.1 (International Tables for Crystallography, vol. G, 2005,
 * ch. 2.2) and files that declare CIF 2.0 (Bernstein et al., J. Appl. Cryst. 49 (2016) 277), and writes both. Whatever
 * is read is kept, so that a file read and written loses no value, and no item need be known.
 */
package io.github.zonewright.cif;
