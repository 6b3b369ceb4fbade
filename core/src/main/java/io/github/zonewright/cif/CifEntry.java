package io.github.zonewright.cif;

/** What a data block holds, in the order of the file: items, loops, save frames and comments. */
public sealed interface CifEntry permits CifItem, CifLoop, CifBlock, CifComment {}
