package io.github.zonewright.crystal;

/**
 * An entry of a list of candidates: where a crystal is, and how to know it again.
 *
 * @param place the shelf or the user's folder
 * @param id its id there
 * @param sha256 the SHA-256 hash of its file when it was put on the list, in hexadecimal
 * @param name what it was called then
 */
public record Candidate(Place place, String id, String sha256, String name) {

    /** Where a crystal is kept. */
    public enum Place {
        /** {@link CrystalShelf}, which comes with the library. */
        SHELF,
        /** {@link CrystalFolder}, which is the user's. */
        FOLDER
    }

    /**
     * Checks id and hash.
     *
     * @throws IllegalArgumentException if the id is blank or the hash not 64 hexadecimal digits
     */
    public Candidate {
        if (id.isBlank()) {
            throw new IllegalArgumentException("id of candidate " + name + ": blank, expected one of the " + place);
        }
        if (!sha256.matches("[0-9a-f]{64}")) {
            throw new IllegalArgumentException(
                    "hash of candidate " + name + ": " + sha256 + ", expected 64 hexadecimal digits");
        }
    }

    /**
     * A crystal of the shelf as a candidate.
     *
     * @param entry the entry
     * @return the candidate
     */
    public static Candidate of(ShelfEntry entry) {
        return new Candidate(Place.SHELF, entry.id(), FileHash.sha256(CrystalShelf.bytes(entry.id())), entry.name());
    }

    /**
     * A crystal of the user's folder as a candidate.
     *
     * @param kept the crystal, as listed
     * @return the candidate
     */
    public static Candidate of(KeptCrystal kept) {
        return new Candidate(
                Place.FOLDER, kept.id(), kept.sha256(), kept.crystal().name());
    }

    /** Whether this is the same crystal, perhaps of another hash. */
    boolean isAt(Candidate other) {
        return place == other.place && id.equals(other.id);
    }
}
