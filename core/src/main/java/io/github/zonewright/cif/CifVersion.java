package io.github.zonewright.cif;

import java.util.List;

/** The version of the syntax, as the first comment of a file declares it. */
public enum CifVersion {
    /** CIF 1.1, and all that declares nothing. */
    CIF_1_1("\\#CIF_1.1"),
    /** CIF 2.0: lists, tables, triple quotes. */
    CIF_2_0("\\#CIF_2.0");

    private final String magic;

    CifVersion(String magic) {
        this.magic = magic;
    }

    /** The first comment of a file of this version, without its leading {@code #}. */
    String magic() {
        return magic;
    }

    /** The version that these comments at the head of a file declare. */
    static CifVersion declaredBy(List<String> heading) {
        boolean second = !heading.isEmpty() && heading.get(0).stripTrailing().equals(CIF_2_0.magic);
        return second ? CIF_2_0 : CIF_1_1;
    }
}
