package io.github.zonewright.imagej.session;

import io.github.zonewright.crystal.CandidateFolder;
import io.github.zonewright.crystal.CrystalFolder;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.crystal.UnreadableFile;
import java.io.IOException;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.stream.Stream;

/**
 * What there is to pick from at one moment: the user's lists and crystals, and the shelf.
 *
 * @param offers everything, in the order in which it is shown
 * @param troubles what of the user's could not be read, in words for people
 */
public record CrystalOffers(List<CrystalOffer> offers, List<String> troubles) {

    private static final int NAMED = 0;
    private static final int BEGUN = 1;
    private static final int WORD = 2;
    private static final int PART = 3;

    /** Copies the lists. */
    public CrystalOffers {
        offers = List.copyOf(offers);
        troubles = List.copyOf(troubles);
    }

    /**
     * Reads what there is now. A folder that can't be read is told among the troubles.
     *
     * @param loose crystals that are kept nowhere; they come first
     * @return the offers
     */
    public static CrystalOffers now(List<? extends CrystalOffer> loose) {
        List<CrystalOffer> offers = new ArrayList<>(loose);
        List<String> troubles = new ArrayList<>();
        try {
            CandidateFolder.Listing lists = UserFolder.lists().list();
            lists.lists().forEach(l -> offers.add(new CrystalOffer.Group(l)));
            CrystalFolder.Listing kept = UserFolder.crystals().list();
            kept.crystals().forEach(k -> offers.add(new CrystalOffer.InFolder(k)));
            Stream.concat(lists.unreadable().stream(), kept.unreadable().stream())
                    .map(UnreadableFile::toString)
                    .forEach(troubles::add);
        } catch (IOException | IllegalArgumentException e) {
            troubles.add("The folder of your crystals can't be read: " + e.getMessage());
        }
        CrystalShelf.entries().forEach(e -> offers.add(new CrystalOffer.OnShelf(e)));
        return new CrystalOffers(offers, troubles);
    }

    /**
     * What some words may mean: the same name or formula first, then names that begin so, then
     * names of which a word begins so.
     *
     * @param words part of a name, or a formula; blank for everything
     * @return the offers
     */
    public List<CrystalOffer> matching(String words) {
        return offers.stream()
                .filter(o -> o.isMeantBy(words))
                .sorted(Comparator.comparingInt(o -> rank(o, words)))
                .toList();
    }

    /**
     * What has exactly this name.
     *
     * @param name the name, in any case
     * @return the crystal of the shelf, else that of the user's, else the list
     */
    public Optional<CrystalOffer> named(String name) {
        String wanted = fold(name);
        return Stream.of(CrystalOffer.OnShelf.class, CrystalOffer.InFolder.class, CrystalOffer.class)
                .flatMap(kind -> offers.stream().filter(kind::isInstance))
                .filter(o -> fold(o.name()).equals(wanted)
                        || o instanceof CrystalOffer.InFolder mine
                                && mine.kept().id().equalsIgnoreCase(name))
                .findFirst();
    }

    private static int rank(CrystalOffer offer, String words) {
        String formula = offer.detail().replaceAll(",.*|\\s", "");
        if (formula.equals(words.replaceAll("\\s", ""))) {
            return NAMED;
        }
        return offer.names().stream().mapToInt(n -> rank(n, words)).min().orElse(PART);
    }

    private static int rank(String name, String words) {
        String wanted = fold(words);
        if (wanted.isEmpty() || fold(name).equals(wanted)) {
            return NAMED;
        }
        if (fold(name).startsWith(wanted)) {
            return BEGUN;
        }
        return name.toLowerCase(Locale.ROOT).contains(" " + words.toLowerCase(Locale.ROOT)) ? WORD : PART;
    }

    static String fold(String name) {
        return name.toLowerCase(Locale.ROOT).replaceAll("[\\s_-]+", "");
    }
}
