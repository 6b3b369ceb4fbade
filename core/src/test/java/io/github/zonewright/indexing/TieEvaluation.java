package io.github.zonewright.indexing;

import io.github.zonewright.TestImages;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.io.IOException;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.Map;

/**
 * Prints, for a folder of patterns with known answers, what is said of every tie and of every half turn that is left open:
 * {@code TieEvaluation folder [only|without name,name,…]}.
 */
public final class TieEvaluation {

    private TieEvaluation() {}

    public static void main(String[] args) throws IOException {
        Path folder = Path.of(args[0]);
        List<String> names = args.length > 2 ? Arrays.asList(args[2].split(",")) : List.of();
        for (Map<String, String> input : PatternTruth.table(folder.resolve("inputs.csv"))) {
            String file = input.get("file");
            boolean named = names.contains(file.replace(".tif", ""));
            if (args.length > 2 && named != args[1].equals("only")) {
                continue;
            }
            Crystal crystal = CrystalCif.read(folder.resolve("crystals").resolve(input.get("cif")))
                    .get(0);
            MeasuredPattern pattern = SpotFinder.measure(TestImages.read(folder.resolve(file)));
            SearchResult result = OrientationSearch.of(
                            crystal,
                            Beam.ofKilovolts(Double.parseDouble(input.get("kV"))),
                            Double.parseDouble(input.get("K_told")),
                            Double.parseDouble(input.get("K_tol_told")),
                            input.get("mirror").equals("1"))
                    .find(pattern);
            if (result.best().isEmpty()) {
                continue;
            }
            Placement best = result.best().get().placement();
            if (result.best().get().halfTurn().isPresent()) {
                tell(file, "half turn", WhatTellsApart.between(pattern, best, WhatTellsApart.halfTurned(best)));
            }
            if (Verdict.of(result) instanceof Verdict.Tied tied) {
                tied.solutions().stream()
                        .skip(1)
                        .forEach(s -> tell(
                                file,
                                best.setting().zone() + " or "
                                        + s.placement().setting().zone(),
                                WhatTellsApart.between(pattern, best, s.placement())));
            }
        }
    }

    private static void tell(String file, String what, Discrimination discrimination) {
        System.out.println(file + ", " + what + ": " + discrimination.kind());
        discrimination.sentences().forEach(s -> System.out.println("    " + s));
    }
}
