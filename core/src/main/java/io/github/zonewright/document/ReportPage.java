package io.github.zonewright.document;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.indexing.Grain;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.indexing.SolutionErrors;
import io.github.zonewright.indexing.Verdict;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Lattice;
import io.github.zonewright.lattice.MillerBravais;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.symmetry.SpaceGroups;
import java.time.format.DateTimeFormatter;
import java.util.Base64;
import java.util.List;
import java.util.Locale;

/** Lays the report out: what it says, in the order in which it is read. */
final class ReportPage {
    private static final int MOST_OTHERS = 3;
    private static final int MOST_NOTICES = 2;
    private static final int MOST_LETTERS = 80;
    private static final int HEADING_LETTERS = 30;

    private static final String STYLE = """
            header { display: flex; justify-content: space-between; align-items: baseline; gap: 4mm; margin-bottom: 2mm; }
            header p { margin: 0; white-space: nowrap; }
            h1 { white-space: nowrap; }
            .verdict { border: .4mm solid #000; padding: .8mm 2mm; margin: 0 0 2mm; font-size: 9.5pt; font-weight: bold; }
            .pair { display: grid; grid-template-columns: 1fr 1fr; gap: 4mm; margin-bottom: 2mm; }
            .pair.last { grid-template-columns: 5fr 6fr; font-size: 7.5pt; }
            .pair.top { grid-template-columns: 88mm 1fr; }
            figure { margin: 0; }
            img { display: block; max-width: 100%; max-height: 88mm; margin: 0 auto; border: .2mm solid #777; }
            figcaption { font-size: 7.5pt; margin-top: .8mm; }
            section { margin-bottom: 2mm; }
            dl { display: grid; grid-template-columns: max-content 1fr; gap: 0 2.5mm; margin: 0; }
            dt { color: #333; }
            dd { margin: 0; overflow-wrap: anywhere; }
            ul { margin: 0; padding-left: 4mm; }
            .spots { display: grid; grid-template-columns: 1fr 1fr 1fr 40mm; gap: 4mm; align-items: start; }
            .residuals svg { display: block; }
            .residuals .line { fill: none; stroke: #000; stroke-width: .2; }
            .residuals figcaption { margin: 0; }
            table { border-collapse: collapse; width: 100%; font-size: 7.5pt; line-height: 1.4;
              font-variant-numeric: tabular-nums; }
            caption { text-align: left; font-size: 7.5pt; color: #444; }
            th, td { text-align: right; padding: 0 1mm; font-weight: normal; }
            thead th { border-bottom: .2mm solid #000; vertical-align: bottom; line-height: 1.15; }
            thead th:first-child { white-space: nowrap; }
            th:first-child { text-align: left; }
            footer { border-top: .3mm solid #000; padding-top: .8mm; font-size: 7.5pt; }
            @media screen { body { max-width: 204mm; } }
            @media screen and (max-width: 640px) { .pair, .pair.top, .spots { display: block; } }
            """;

    private final FitReport report;
    private final FitDocument fit;
    private final Placement placement;
    private final Crystal crystal;
    private Markup out;

    ReportPage(FitReport report) {
        this.report = report;
        this.fit = report.fit();
        this.placement = fit.placement();
        this.crystal = placement.crystal();
    }

    String html() {
        String title = "Zone axis [" + placement.setting().zone() + "] of " + crystal.name();
        return Sheet.of(title, STYLE, markup -> {
            out = markup;
            header();
            out.open("main").line();
            out.element("p", verdict(), "class", "verdict").line();
            boolean pictured = report.picture().length > 0;
            out.open("div", "class", pictured ? "pair top" : "pair");
            if (pictured) {
                figure();
            }
            out.open("div");
            section("Solution", this::solution);
            section("Instrument", this::instrument);
            section("Crystal", this::crystal);
            out.close().close().line();
            fit.solution().ifPresent(s -> section("Spots explained", () -> new SpotColumns(s).write(out)));
            if (!fit.findings().grains().isEmpty()) {
                section("Further crystals", this::grains);
            }
            fit.findings().apart().ifPresent(apart -> section("What tells apart", () -> apart(apart)));
            out.open("div", "class", "pair last");
            section("Alternatives", this::alternatives);
            section("Cautions", this::cautions);
            out.close().close().line();
            provenance();
        });
    }

    private void section(String heading, Runnable content) {
        out.open("section").element("h2", heading);
        content.run();
        out.close().line();
    }

    private void header() {
        out.open("header").open("h1").text("Zone axis ");
        zone(placement.setting().zone());
        out.text(" of " + clipped(crystal.name(), HEADING_LETTERS)).close();
        out.open("p", "class", "quiet");
        fit.image().ifPresent(i -> out.text(clipped(i.fileName(), HEADING_LETTERS)));
        fit.created().ifPresent(t -> out.text(", " + t.toLocalDate()));
        out.close().close().line();
    }

    private String verdict() {
        if (fit.solution().isEmpty()) {
            return "Laid by hand: no fit stands behind this pattern.";
        }
        return report.verdict()
                .map(Verdict::sentence)
                .orElse("No verdict: the other solutions of the search are not in this report.");
    }

    private void figure() {
        String alt =
                "Diffraction pattern" + fit.image().map(i -> " " + i.fileName()).orElse("")
                        + " with the computed spots of " + crystal.name() + " along ["
                        + placement.setting().zone() + "] drawn over it";
        String data = "data:image/png;base64," + Base64.getEncoder().encodeToString(report.picture());
        out.open("figure").empty("img", "src", data, "alt", alt);
        out.element(
                "figcaption",
                "○ computed spot, the larger the stronger; ◇ measured, not explained; △ computed strong, not measured; "
                        + "✚ centre, with a line towards the reference reflection"
                        + (fit.findings().grains().isEmpty() ? "." : "; ⌜ ⌟ computed spot of a further crystal."));
        out.close().line();
    }

    private void solution() {
        ZoneSetting setting = placement.setting();
        out.open("dl");
        term("Zone axis");
        zone(setting.zone());
        if (crystal.lattice().hasHexagonalAxes()) {
            out.text(" = [").indices(MillerBravais.of(setting.zone())).text("]");
        }
        end();
        SolutionErrors none =
                new SolutionErrors(Double.NaN, Double.NaN, Double.NaN, Double.NaN, Double.NaN, Double.NaN);
        SolutionErrors errors = fit.solution().map(Solution::errors).orElse(none);
        term("Rotation");
        out.text(angle(setting.rotation(), errors.rotation()) + ", azimuth of ")
                .indices(
                        setting.reference().h(),
                        setting.reference().k(),
                        setting.reference().l());
        end();
        item("Lean right", angle(setting.leanX(), errors.leanX()));
        item("Lean upwards", angle(setting.leanY(), errors.leanY()));
        Camera camera = placement.camera();
        item(
                "Centre x, y",
                Figures.uncertain(camera.centre().x(), errors.centreX(), "") + ", "
                        + Figures.uncertain(camera.centre().y(), errors.centreY(), " px"));
        fit.solution().ifPresent(this::counts);
        out.close();
    }

    private void counts(Solution s) {
        item("Residual", Figures.plain(s.rmsResidual(), 2) + " px, root mean square");
        item(
                "Explained",
                s.matches().size() + " of "
                        + (s.matches().size() + s.unexplained().size()) + " measured spots");
        item("Unexplained", Integer.toString(s.unexplained().size()));
        report.missing().ifPresent(missing -> {
            term("Missing");
            out.text(missing.isEmpty() ? "none" : missing.size() + ": ");
            for (Hkl hkl : missing.stream().limit(MOST_OTHERS).toList()) {
                out.indices(hkl.h(), hkl.k(), hkl.l()).text(" ");
            }
            out.text(missing.size() > MOST_OTHERS ? "…" : "");
            end();
        });
        item("Score", Figures.plain(s.score(), 1) + " nats");
    }

    private void instrument() {
        Beam beam = placement.beam();
        Camera camera = placement.camera();
        out.open("dl");
        item("Voltage", Figures.significant(beam.kilovolts(), 6) + " kV");
        item("Wavelength", Figures.plain(beam.wavelength(), 5) + " Å");
        double error = fit.solution().map(s -> s.errors().constant()).orElse(Double.NaN);
        item("Camera constant", Figures.uncertain(camera.constant(), error, " px·Å"));
        item(
                "Ellipse",
                camera.ellipseRatio() == 1
                        ? "none"
                        : "ratio " + Figures.plain(camera.ellipseRatio(), 4) + ", long axis at "
                                + Figures.plain(Math.toDegrees(camera.ellipseAzimuth()), 1) + "°");
        item("Image is mirrored", (camera.mirrored() ? "yes" : "no") + ", as told");
        item("Calibration", report.calibration().isEmpty() ? "none named" : clipped(report.calibration()));
        out.close();
    }

    private void crystal() {
        Lattice cell = crystal.lattice();
        out.open("dl");
        item("Name", clipped(crystal.name()));
        item("Formula", clipped(crystal.formula()));
        item(
                "Cell",
                String.format(
                        Locale.ROOT,
                        "a\u00a0%.4f, b\u00a0%.4f, c\u00a0%.4f\u00a0Å; α\u00a0%.2f, β\u00a0%.2f, γ\u00a0%.2f°",
                        cell.a(),
                        cell.b(),
                        cell.c(),
                        Math.toDegrees(cell.alpha()),
                        Math.toDegrees(cell.beta()),
                        Math.toDegrees(cell.gamma())));
        item(
                "Space group",
                SpaceGroups.identify(crystal.spaceGroup())
                        .map(s -> s.hermannMauguin() + ", No. " + s.number())
                        .orElse("no tabulated setting, " + crystal.spaceGroup().order() + " operations"));
        List<String> notices = crystal.notices();
        notices.stream().limit(MOST_NOTICES).forEach(n -> item("Notice", clipped(n)));
        if (notices.size() > MOST_NOTICES) {
            item("", notices.size() - MOST_NOTICES + " more in the record");
        }
        out.close();
    }

    private void grains() {
        out.open("ul");
        for (Grain grain : fit.findings().grains()) {
            Solution solution = grain.solution();
            Crystal theirs = solution.placement().crystal();
            ZoneSetting setting = solution.placement().setting();
            out.open("li");
            zone(setting.zone());
            out.text(" of " + clipped(theirs.name(), HEADING_LETTERS));
            rotation(setting);
            out.text(": " + solution.matches().size() + " explained, "
                            + grain.shared().size() + " of them shared; " + grain.standing() + ".")
                    .close();
        }
        out.close();
    }

    private void apart(ToldApart apart) {
        out.open("ul");
        out.element("li", "From " + clipped(apart.other()) + ":");
        apart.sentences().forEach(s -> out.element("li", s));
        out.close();
    }

    private void rotation(ZoneSetting setting) {
        out.text(", rotation " + Figures.plain(Math.toDegrees(setting.rotation()), 2) + "° of ")
                .indices(
                        setting.reference().h(),
                        setting.reference().k(),
                        setting.reference().l());
    }

    private void alternatives() {
        out.open("ul");
        fit.solution().flatMap(Solution::halfTurn).ifPresent(mate -> {
            ZoneSetting here = placement.setting();
            ZoneSetting turned = ZoneSetting.of(mate, crystal.lattice(), here.zone(), here.reference());
            out.open("li")
                    .text("Half a turn about the zone axis away, the same spots: rotation "
                            + Figures.plain(Math.toDegrees(turned.rotation()), 2) + "°.");
            out.close();
        });
        List<Solution> others = report.others();
        for (Solution other : others.stream().limit(MOST_OTHERS).toList()) {
            ZoneSetting setting = other.placement().setting();
            out.open("li");
            zone(setting.zone());
            Crystal theirs = other.placement().crystal();
            out.text(theirs.equals(crystal) ? "" : " of " + clipped(theirs.name(), HEADING_LETTERS));
            rotation(setting);
            out.text(": " + other.matches().size() + " explained, residual "
                    + Figures.plain(other.rmsResidual(), 2) + " px, score "
                    + Figures.plain(other.score(), 1)
                    + (isFurther(other) ? "; it is the further crystal above" : ""));
            out.close();
        }
        if (others.size() > MOST_OTHERS) {
            out.element("li", others.size() - MOST_OTHERS + " more with lower scores.");
        }
        if (others.isEmpty() && fit.solution().flatMap(Solution::halfTurn).isEmpty()) {
            out.element("li", "None known.");
        }
        out.close();
    }

    private boolean isFurther(Solution other) {
        return fit.findings().grains().stream().anyMatch(g -> g.isFoundAs(other));
    }

    private void cautions() {
        out.open("ul");
        fit.cautions().forEach(c -> out.element("li", c.details()));
        fit.solution().stream().flatMap(s -> s.remarks().stream()).forEach(r -> out.element("li", r));
        out.element(
                "li",
                "Uncertainties are standard uncertainties of the fit. They hold if crystal and zone axis are right and say "
                        + "nothing about whether they are.");
        out.element(
                "li",
                "Spots give the ratio of camera constant to cell, not either alone; the lean comes from intensities, which "
                        + "thickness and bending change.");
        out.close();
    }

    private void provenance() {
        out.open("footer").open("dl");
        item(
                "Image",
                fit.image()
                        .map(i -> clipped(i.fileName()) + ", " + i.width() + " × " + i.height() + " px")
                        .orElse("not known"));
        fit.image().flatMap(ImageReference::sha256).ifPresent(digits -> item("SHA-256 of the pixels", digits));
        item(
                "Made",
                "by " + (fit.software().isEmpty() ? "a program that did not say its name" : clipped(fit.software()))
                        + fit.created()
                                .map(t -> ", " + DateTimeFormatter.ISO_OFFSET_DATE_TIME.format(t))
                                .orElse(""));
        out.close().close().line();
    }

    private void zone(Uvw zone) {
        out.text("[").indices(zone.u(), zone.v(), zone.w()).text("]");
    }

    private void item(String name, String value) {
        term(name);
        out.text(value);
        end();
    }

    private void term(String name) {
        out.element("dt", name).open("dd");
    }

    private void end() {
        out.close();
    }

    private static String angle(double radians, double error) {
        return Figures.uncertain(Math.toDegrees(radians), Math.toDegrees(error), "°");
    }

    private static String clipped(String text) {
        return clipped(text, MOST_LETTERS);
    }

    private static String clipped(String text, int most) {
        String line = text.strip().replaceAll("\\s+", " ");
        return line.length() <= most ? line : line.substring(0, most - 1) + "…";
    }
}
