package io.github.zonewright.imagej.workbench;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.command.Answer;
import io.github.zonewright.imagej.session.PatternDrag;
import io.github.zonewright.imagej.session.PatternMove;
import io.github.zonewright.imagej.session.ReferenceReflection;
import io.github.zonewright.indexing.LockedRefinement.Lock;
import io.github.zonewright.indexing.Solution;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.function.Consumer;
import java.util.function.Function;
import javax.swing.JButton;
import javax.swing.JCheckBox;
import javax.swing.JComboBox;
import javax.swing.JLabel;

/** The pattern by hand: zone, rotation, lean, centre and scale, typed or stepped. */
final class HandSection extends Section {
    private static final long serialVersionUID = 1L;
    private static final double FULL_TURN = 360;

    private final CheckedField<Uvw> zone = new CheckedField<>("zone", 8, Reading::zone);
    private final CheckedField<Hkl> reference = new CheckedField<>("reference", 8, Reading::reflection);
    private final StepField rotation = new StepField("rotation", -FULL_TURN, FULL_TURN, 1, 2);
    private final StepField leanX = new StepField("lean right", -45, 45, 0.1, 2);
    private final StepField leanY = new StepField("lean up", -45, 45, 0.1, 2);
    private final StepField centreX = new StepField("centre x", -1e5, 1e5, 1, 2);
    private final StepField centreY = new StepField("centre y", -1e5, 1e5, 1, 2);
    private final StepField constant = new StepField("camera constant", 1e-3, 1e8, 1, 2);
    private final JLabel lean = Looks.quiet("");
    private final JLabel ellipse = Looks.label("");
    private final transient LockBoxes locks = new LockBoxes();
    private final JButton refine = new JButton("Refine");
    private final JButton undo = new JButton("Undo");
    private final JCheckBox indices = new JCheckBox("Indices");
    private final JButton back = new JButton("Back to the fit");
    private final JButton upwards = new JButton("Reference up");
    private final JComboBox<String> drag = new JComboBox<>(new String[] {"turns", "stretches", "tilts"});
    private transient Optional<Placement> shown = Optional.empty();
    private transient Consumer<Placement> onChange = placement -> {};
    private transient Consumer<Uvw> onNew = axis -> {};

    HandSection() {
        super("By hand");
        row("Zone axis", zone, zone.reasonLabel());
        row("Reference", reference, reference.reasonLabel());
        row("Rotation", rotation, Looks.label("°"), locks.of(Lock.ROTATION), rotation.reasonLabel());
        row(
                "Lean right, up",
                leanX,
                Looks.label("°"),
                leanY,
                Looks.label("°"),
                locks.of(Lock.LEAN),
                lean,
                reasons(leanX, leanY));
        row(
                "Centre x, y",
                centreX,
                Looks.label("px"),
                centreY,
                Looks.label("px"),
                locks.of(Lock.CENTRE),
                reasons(centreX, centreY));
        row(
                "Camera constant",
                constant,
                Looks.label("px·Å"),
                locks.of(Lock.CAMERA_CONSTANT),
                constant.reasonLabel(),
                ellipse,
                locks.of(Lock.ELLIPSE));
        row("A drag", drag, upwards, back);
        wide(line(refine, undo, indices));
        for (var part : List.of(refine, undo, indices, drag, upwards, back)) {
            part.setFont(Looks.text());
        }
        drag.setMaximumSize(drag.getPreferredSize());
        drag.setName("drag");
        drag.setToolTipText(
                "What a drag on the image does; with Ctrl it stretches, with Alt it tilts whatever is chosen");
        drag.setSelectedItem(HandTool.drag().verb());
        drag.addActionListener(e -> HandTool.use(PatternDrag.values()[drag.getSelectedIndex() + 1]));
        upwards.setToolTipText("Turns the pattern until the reference reflection points up");
        back.setToolTipText("Lays the fitted pattern over the image again (Home on the image)");
        upwards.setName("Reference up");
        back.setName("Back to the fit");
        upwards.addActionListener(
                e -> change(p -> PatternMove.upwards(p, p.setting().reference()).on(p)));
        centreX.setToolTipText(
                "Where the direct beam meets the image, from its left edge; on the image, drag the cross");
        centreY.setToolTipText(
                "Where the direct beam meets the image, from its upper edge; on the image, drag the cross");
        constant.setToolTipText("R·d of the pattern laid over the image: larger stretches it");
        indices.setToolTipText("Writes its h k l beneath each computed spot, as far as there is room");
        zone.setToolTipText("[uvw], from the specimen towards the electron source");
        reference.setToolTipText("The reflection from whose azimuth the rotation is counted");
        rotation.setToolTipText(
                "Azimuth of the reference, counter-clockwise from the right; on the image, drag to turn");
        leanX.setToolTipText("How far the zone axis leans from the beam towards the right");
        leanY.setToolTipText("How far the zone axis leans from the beam upwards");
        ellipse.setToolTipText(
                "Long axis over short axis of what ought to be a circle, and the azimuth of the long one");
        refine.setToolTipText("Fits orientation, centre and scale to the measured spots near the pattern");
        undo.setToolTipText("Takes back the last change by hand (Ctrl+Z)");
        refine.setName("Refine");
        undo.setName("Undo");
        indices.setName("Indices");
        zone.onChange(() -> zone.value().ifPresent(this::changeZone));
        reference.onChange(() -> reference.value().ifPresent(this::changeReference));
        rotation.onChange(v -> setting(s -> new ZoneSetting(
                s.zone(), s.reference(), Math.toRadians(Math.IEEEremainder(v, FULL_TURN)), s.leanX(), s.leanY())));
        leanX.onChange(v ->
                setting(s -> new ZoneSetting(s.zone(), s.reference(), s.rotation(), Math.toRadians(v), s.leanY())));
        leanY.onChange(v ->
                setting(s -> new ZoneSetting(s.zone(), s.reference(), s.rotation(), s.leanX(), Math.toRadians(v))));
        centreX.onChange(v ->
                change(p -> p.centredAt(new PixelPoint(v, p.camera().centre().y()))));
        centreY.onChange(
                v -> change(p -> p.centredAt(new PixelPoint(p.camera().centre().x(), v))));
        constant.onChange(v -> change(p -> p.withCamera(p.camera().withConstant(v))));
        show(Optional.empty(), Optional.empty());
    }

    JButton refine() {
        return refine;
    }

    /** What is held while the pattern is refined; the zone axis always is. */
    Set<Lock> held() {
        return locks.held();
    }

    JButton undo() {
        return undo;
    }

    JButton back() {
        return back;
    }

    JCheckBox indices() {
        return indices;
    }

    /** Is told of every change of the pattern by hand. */
    void onChange(Consumer<Placement> listener) {
        onChange = listener;
    }

    /** Is told of a zone axis typed while there is no pattern yet. */
    void onNew(Consumer<Uvw> listener) {
        onNew = listener;
    }

    /** Shows a pattern, as it was fitted or not, without telling the listeners. */
    void show(Optional<Placement> placement, Optional<Solution> fitted) {
        lean.setText(fitted.filter(Answer::isLeanUncertain).isPresent() ? "uncertain" : "");
        lean.setToolTipText(fitted.map(Answer::lean).orElse(null));
        shown = placement;
        List<StepField> steps = List.of(rotation, leanX, leanY, centreX, centreY, constant);
        steps.forEach(field -> field.setEnabled(placement.isPresent()));
        reference.setEnabled(placement.isPresent());
        locks.setEnabled(placement.isPresent());
        upwards.setEnabled(placement.isPresent());
        ellipse.setText("   Ellipse "
                + placement.map(Placement::camera).map(HandSection::ellipse).orElse(""));
        if (placement.isEmpty()) {
            steps.forEach(StepField::clear);
            blank(zone);
            blank(reference);
            return;
        }
        Placement p = placement.get();
        ZoneSetting s = p.setting();
        if (!zone.value().filter(s.zone()::equals).isPresent()) {
            zone.show(s.zone().toString());
        }
        if (!reference.value().filter(s.reference()::equals).isPresent()) {
            reference.show(s.reference().toString());
        }
        rotation.show(Math.toDegrees(s.rotation()));
        leanX.show(Math.toDegrees(s.leanX()));
        leanY.show(Math.toDegrees(s.leanY()));
        centreX.show(p.camera().centre().x());
        centreY.show(p.camera().centre().y());
        constant.show(p.camera().constant());
    }

    private static String ellipse(Camera camera) {
        return camera.ellipseRatio() == 1
                ? "none"
                : Reading.fixed(camera.ellipseRatio(), 4) + " at "
                        + Reading.fixed(Math.toDegrees(camera.ellipseAzimuth()), 0) + "°";
    }

    private void changeZone(Uvw axis) {
        if (shown.isEmpty()) {
            onNew.accept(axis);
            return;
        }
        try {
            Hkl first = ReferenceReflection.of(shown.get().crystal(), axis);
            setting(s -> s.zone().equals(axis) ? s : new ZoneSetting(axis, first, s.rotation(), s.leanX(), s.leanY()));
        } catch (IllegalArgumentException e) {
            zone.reasonLabel().setText("no reflection in reach");
        }
    }

    private void changeReference(Hkl hkl) {
        if (shown.isEmpty()) {
            return;
        }
        Placement p = shown.get();
        if (hkl.isZero() || hkl.dot(p.setting().zone()) != 0) {
            reference.reasonLabel().setText("not a reflection of this zone");
            return;
        }
        setting(s -> ZoneSetting.of(p.orientation(), p.crystal().lattice(), s.zone(), hkl));
    }

    private void setting(Function<ZoneSetting, ZoneSetting> how) {
        change(p -> p.withSetting(how.apply(p.setting())));
    }

    private void change(Function<Placement, Placement> how) {
        shown.ifPresent(p -> {
            Placement changed = how.apply(p);
            if (!changed.equals(p)) {
                onChange.accept(changed);
            }
        });
    }

    private static void blank(CheckedField<?> field) {
        field.show("");
        field.reasonLabel().setText("");
        field.setBackground(java.awt.Color.WHITE);
    }

    private static JLabel reasons(StepField first, StepField second) {
        JLabel reason = first.reasonLabel();
        second.reasonLabel().addPropertyChangeListener("text", e -> {
            if (first.value().isPresent() || !second.reasonLabel().getText().isEmpty()) {
                reason.setText(second.reasonLabel().getText());
            }
        });
        return reason;
    }
}
