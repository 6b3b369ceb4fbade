package io.github.zonewright.imagej.workbench;

import io.github.zonewright.indexing.LockedRefinement.Lock;
import java.util.EnumMap;
import java.util.EnumSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import javax.swing.JCheckBox;

/** Check boxes that hold parts of a pattern while it is refined. */
final class LockBoxes {
    private final Map<Lock, JCheckBox> boxes = new EnumMap<>(Lock.class);

    /** The box for a part. */
    JCheckBox of(Lock lock) {
        return boxes.computeIfAbsent(lock, part -> {
            JCheckBox box = new JCheckBox("Hold");
            box.setName("hold " + part.name().toLowerCase(java.util.Locale.ROOT).replace('_', ' '));
            box.setFont(Looks.text());
            box.setToolTipText("Refine leaves this as it is");
            return box;
        });
    }

    /** What is held. */
    Set<Lock> held() {
        Set<Lock> held = EnumSet.noneOf(Lock.class);
        boxes.forEach((lock, box) -> {
            if (box.isSelected()) {
                held.add(lock);
            }
        });
        return held;
    }

    void setEnabled(boolean enabled) {
        List.copyOf(boxes.values()).forEach(box -> box.setEnabled(enabled));
    }
}
