package io.github.zonewright.imagej.command;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.spots.MeasuredPattern;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;
import java.util.stream.Collectors;

/**
 * The search over several crystals: each is searched by itself, and the solutions are ranked together by their scores.
 *
 * @param crystals the crystals, at least one
 * @param beam the beam
 * @param cameraConstant camera constant in px·Å, as told
 * @param tolerance how far it may be off, as a part of it: 0.03 for 3 %
 * @param mirrored whether the image is mirrored
 */
public record CandidateSearch(
        List<Crystal> crystals, Beam beam, double cameraConstant, double tolerance, boolean mirrored) {

    /**
     * Copies the list and checks the numbers.
     *
     * @throws IllegalArgumentException if there is no crystal, or as {@link Search} does
     */
    public CandidateSearch {
        crystals = List.copyOf(crystals);
        if (crystals.isEmpty()) {
            throw new IllegalArgumentException("crystals: none, expected at least one to search for");
        }
        new Search(crystals.get(0), beam, cameraConstant, tolerance, mirrored);
    }

    /**
     * Searches for orientations of every crystal.
     *
     * @param measured the measured spots
     * @param progress is told how far the search is, 0 to 1
     * @param cancelled is asked whether to stop
     * @return the solutions of all crystals, best first, and a sentence
     */
    public SearchResult run(MeasuredPattern measured, DoubleConsumer progress, BooleanSupplier cancelled) {
        int count = crystals.size();
        List<Solution> solutions = new ArrayList<>();
        List<String> sentences = new ArrayList<>();
        for (int i = 0; i < count; i++) {
            int done = i;
            Crystal crystal = crystals.get(i);
            try {
                SearchResult result = new Search(crystal, beam, cameraConstant, tolerance, mirrored)
                        .run(measured, part -> progress.accept((done + part) / count), cancelled);
                if (count == 1) {
                    return result;
                }
                solutions.addAll(result.solutions());
                if (result.solutions().isEmpty()) {
                    sentences.add(crystal.name() + ": " + result.explanation());
                }
            } catch (IllegalArgumentException e) {
                if (count == 1) {
                    throw e;
                }
                sentences.add(crystal.name() + ": " + e.getMessage());
            }
        }
        solutions.sort(Comparator.comparingDouble(Solution::score).reversed());
        return new SearchResult(solutions, explanation(solutions, sentences));
    }

    private String explanation(List<Solution> solutions, List<String> sentences) {
        if (solutions.isEmpty()) {
            return "None of the " + crystals.size() + " crystals explains the spots. " + String.join(" ", sentences);
        }
        List<String> names = solutions.stream()
                .map(s -> s.placement().crystal().name())
                .distinct()
                .toList();
        return names.size() + " of " + crystals.size() + " crystals explain spots: "
                + names.stream().collect(Collectors.joining(", ")) + ".";
    }
}
