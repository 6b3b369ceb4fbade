package io.github.zonewright.crystal;

/** One structure of a CIF that may hold several: a block with a cell or sites. */
public sealed interface CifStructure {

    /**
     * The block it stands in.
     *
     * @return the name of the block; not always different from that of another
     */
    String block();

    /**
     * What people call it.
     *
     * @return the name that the block gives, else that of the block
     */
    String name();

    /**
     * A structure that can be used.
     *
     * @param block the name of the block
     * @param crystal the crystal
     */
    record Usable(String block, Crystal crystal) implements CifStructure {
        @Override
        public String name() {
            return crystal.name();
        }

        /**
         * Name and formula, for a list.
         *
         * @return for example {@code Rutile (O2 Ti)}
         */
        @Override
        public String toString() {
            return name() + " (" + crystal.formula() + ")";
        }
    }

    /**
     * A structure that cannot be used.
     *
     * @param block the name of the block
     * @param name what people call it
     * @param cause what is wrong, with line and item: a {@link io.github.zonewright.cif.CifException} or a
     *     {@link CrystalCifException}
     */
    record Refused(String block, String name, IllegalArgumentException cause) implements CifStructure {
        /**
         * Why it cannot be used.
         *
         * @return the message, with line and item
         */
        public String reason() {
            return cause.getMessage();
        }

        /**
         * Name and reason, for a list.
         *
         * @return for example {@code Rutile: line 12, …}
         */
        @Override
        public String toString() {
            return name + ": " + reason();
        }
    }
}
