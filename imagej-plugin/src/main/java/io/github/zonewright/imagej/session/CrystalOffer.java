package io.github.zonewright.imagej.session;

import io.github.zonewright.crystal.Candidate;
import io.github.zonewright.crystal.CandidateList;
import io.github.zonewright.crystal.Candidates;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.crystal.KeptCrystal;
import io.github.zonewright.crystal.ShelfEntry;
import java.io.IOException;
import java.util.List;
import java.util.Optional;
import java.util.stream.Stream;

/** Something to pick where a crystal is asked for: one crystal, or a list of candidates. */
public sealed interface CrystalOffer {
    /**
     * What people call it.
     *
     * @return the name
     */
    String name();

    /**
     * Every name it is found by.
     *
     * @return the names, the first of them {@link #name()}
     */
    default List<String> names() {
        return List.of(name());
    }

    /**
     * Formula and place, for a list.
     *
     * @return for example {@code C Fe3, shelf}
     */
    String detail();

    /**
     * Reads it.
     *
     * @return its crystals, and what is missing of a list
     * @throws IOException if the user's folder can't be read
     */
    Candidates read() throws IOException;

    /**
     * Whether a person may mean it by some words.
     *
     * @param words part of a name, or a formula; blank for everything
     * @return whether it is meant
     */
    boolean isMeantBy(String words);

    /**
     * What stands on a list of candidates for it.
     *
     * @return the candidate, or empty for what is kept nowhere and for lists
     */
    default Optional<Candidate> candidate() {
        return Optional.empty();
    }

    /**
     * A crystal of the shelf.
     *
     * @param entry the entry
     */
    record OnShelf(ShelfEntry entry) implements CrystalOffer {
        @Override
        public String name() {
            return entry.name();
        }

        @Override
        public List<String> names() {
            return Stream.concat(Stream.of(entry.name()), entry.otherNames().stream())
                    .toList();
        }

        @Override
        public String detail() {
            return entry.formula();
        }

        @Override
        public Candidates read() {
            return new Candidates(List.of(entry.crystal()), List.of());
        }

        @Override
        public boolean isMeantBy(String words) {
            return CrystalShelf.search(words).contains(entry);
        }

        @Override
        public Optional<Candidate> candidate() {
            return Optional.of(Candidate.of(entry));
        }
    }

    /**
     * A crystal of the user's folder.
     *
     * @param kept the crystal, as listed
     */
    record InFolder(KeptCrystal kept) implements CrystalOffer {
        @Override
        public String name() {
            return kept.crystal().name();
        }

        @Override
        public String detail() {
            return kept.crystal().formula() + ", my shelf";
        }

        @Override
        public Candidates read() {
            return new Candidates(List.of(kept.crystal()), List.of());
        }

        @Override
        public boolean isMeantBy(String words) {
            return kept.crystal().isMeantBy(words);
        }

        @Override
        public Optional<Candidate> candidate() {
            return Optional.of(Candidate.of(kept));
        }
    }

    /**
     * A crystal that is not kept: opened from a file, typed in, or that of an image.
     *
     * @param crystal the crystal
     * @param origin where it came from, in a word or two
     */
    record Loose(Crystal crystal, String origin) implements CrystalOffer {
        @Override
        public String name() {
            return crystal.name();
        }

        @Override
        public String detail() {
            return crystal.formula() + ", " + origin;
        }

        @Override
        public Candidates read() {
            return new Candidates(List.of(crystal), List.of());
        }

        @Override
        public boolean isMeantBy(String words) {
            return crystal.isMeantBy(words);
        }
    }

    /**
     * A list of candidates.
     *
     * @param list the list
     */
    record Group(CandidateList list) implements CrystalOffer {
        @Override
        public String name() {
            return list.name();
        }

        @Override
        public String detail() {
            return "list of " + list.candidates().size();
        }

        @Override
        public Candidates read() throws IOException {
            return UserFolder.lists().crystals(list);
        }

        @Override
        public boolean isMeantBy(String words) {
            return CrystalOffers.fold(name()).contains(CrystalOffers.fold(words));
        }
    }
}
