package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import io.github.zonewright.crystal.CandidateList;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalCif;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.crystal.StructureType;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.imagej.session.UserFolder;
import java.awt.event.KeyEvent;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Set;
import javax.swing.JButton;
import javax.swing.JFrame;
import javax.swing.JList;
import javax.swing.JTable;
import javax.swing.JTextField;
import javax.swing.JTextPane;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The crystal in the workbench, on a real ImageJ: picked, opened, dropped, typed in, kept, and in lists. */
@Tag("window")
class CrystalSectionTest {
    private static final String TWO_USABLE_ONE_NOT = String.join(
            "\n",
            "data_one",
            "_chemical_name_common 'First salt'",
            "_cell_length_a 5.64",
            "_cell_length_b 5.64",
            "_cell_length_c 5.64",
            "_cell_angle_alpha 90",
            "_cell_angle_beta 90",
            "_cell_angle_gamma 90",
            "_space_group_name_H-M_alt 'F m -3 m'",
            "loop_ _atom_site_label _atom_site_fract_x _atom_site_fract_y _atom_site_fract_z",
            "Na 0 0 0",
            "Cl 0.5 0.5 0.5",
            "data_two",
            "_chemical_name_common 'Broken salt'",
            "_cell_length_a five",
            "data_three",
            "_chemical_name_common 'Third salt'",
            "_cell_length_a 6.29",
            "_cell_length_b 6.29",
            "_cell_length_c 6.29",
            "_cell_angle_alpha 90",
            "_cell_angle_beta 90",
            "_cell_angle_gamma 90",
            "_space_group_name_H-M_alt 'F m -3 m'",
            "loop_ _atom_site_label _atom_site_fract_x _atom_site_fract_y _atom_site_fract_z",
            "K 0 0 0",
            "Cl 0.5 0.5 0.5",
            "");

    @TempDir
    Path folder;

    @TempDir
    Path files;

    private ImagePlus image;
    private JFrame frame;
    private Fingerprint before;

    @BeforeEach
    void open() {
        Screen.start();
        Screen.userFolder(folder);
        image = Screen.show(TestPatterns.imageOfUser());
        before = Fingerprint.of(image);
        frame = Screen.workbench();
        Screen.await(() -> Screen.guide(frame).contains("spots"));
        Screen.pick(frame, "Copper");
    }

    @AfterEach
    void close() {
        before.assertSame(image);
        Screen.clear();
    }

    @Test
    void words_offerWhatTheyMayMean() {
        Screen.type(frame, "crystal", "Fe3C");
        assertEquals("Cementite", shown());
        Screen.press(Screen.find(frame, "crystal", JTextField.class), KeyEvent.VK_ESCAPE);
        assertEquals("Copper", shown());
        Screen.pick(frame, "rut");
        assertEquals("Rutile", shown());
        assertTrue(text().contains("O2 Ti") && text().contains("P 42/m n m, No. 136"), text());
        assertTrue(text().contains("g/cm³"), text());
    }

    @Test
    void arrows_moveInTheList_andAClickPicks() {
        Screen.type(frame, "crystal", "titanium");
        String first = shown();
        JTextField field = Screen.find(frame, "crystal", JTextField.class);
        Screen.press(field, KeyEvent.VK_DOWN);
        assertNotEquals(first, shown());
        Screen.press(field, KeyEvent.VK_UP);
        assertEquals(first, shown());
        Screen.onEventThread(() -> {
            JList<?> offers = Screen.popup("crystal offers", JList.class);
            java.awt.Rectangle third = offers.getCellBounds(2, 2);
            offers.dispatchEvent(new java.awt.event.MouseEvent(
                    offers,
                    java.awt.event.MouseEvent.MOUSE_RELEASED,
                    System.currentTimeMillis(),
                    0,
                    third.x + 5,
                    third.y + 5,
                    1,
                    false));
            return null;
        });
        assertTrue(shown().toLowerCase(java.util.Locale.ROOT).contains("titan"), shown());
        assertNotEquals(first, shown());
        assertTrue(text().contains("Ti"), text());
    }

    @Test
    void nonsense_picksNothing() {
        Screen.pick(frame, "unobtainium");
        Screen.press(Screen.find(frame, "crystal", JTextField.class), KeyEvent.VK_ESCAPE);
        assertEquals("Copper", shown());
        assertTrue(text().startsWith("Cu"), text());
    }

    @Test
    void brokenFileInTheFolder_isToldUnderTheList() throws IOException {
        Files.writeString(folder.resolve("broken.cif"), "data_x\n_cell_length_a five\n", StandardCharsets.UTF_8);
        Screen.type(frame, "crystal", "gold");
        assertTrue(Screen.popup("crystal troubles", javax.swing.JLabel.class)
                .getText()
                .contains("broken.cif: line 2"));
        Screen.press(Screen.find(frame, "crystal", JTextField.class), KeyEvent.VK_ENTER);
        assertEquals("Gold", shown());
    }

    @Test
    void thallium_carriesItsCautionFirst() {
        Screen.pick(frame, "TlCl");
        assertEquals("Thallium chloride", shown());
        assertTrue(text().startsWith("CAUTION"), text());
    }

    @Test
    void fileWithSeveral_asksWhich_andSaysWhyOneIsNot() throws IOException {
        drop(write("salts.cif", TWO_USABLE_ONE_NOT));
        JFrame choice = Screen.window("structures window");
        JList<?> list = Screen.find(choice, "structures", JList.class);
        assertEquals(3, list.getModel().getSize());
        assertTrue(
                list.getModel().getElementAt(1).toString().contains("line 15"),
                list.getModel().getElementAt(1).toString());
        select(list, 1);
        assertFalse(Screen.find(choice, "Use", JButton.class).isEnabled());
        select(list, 2);
        Screen.click(choice, "Use");
        assertEquals("Third salt", shown());
        assertTrue(text().contains("Cl K"), text());
    }

    @Test
    void badFile_isSaid_andChangesNothing() throws IOException {
        drop(write("bad.cif", "data_x\nloop_\n_a _b\n1 2 3\n"));
        assertTrue(text().startsWith("bad.cif: "), text());
        assertEquals("Copper", shown());
        drop(files.resolve("missing.cif"));
        assertTrue(text().contains("can't be read"), text());
        drop(write("empty.cif", ""));
        assertTrue(text().contains("empty.cif"), text());
    }

    @Test
    void notices_areThereInFull() throws IOException {
        drop(write(
                "truncated.cif",
                TWO_USABLE_ONE_NOT
                        .substring(0, TWO_USABLE_ONE_NOT.indexOf("data_two"))
                        .replace("Cl 0.5 0.5 0.5", "Cl 0.5 0.4999 0.5\nCl2 0.5 0.5 0.5")));
        Crystal opened = CrystalCif.read(files.resolve("truncated.cif")).get(0);
        assertFalse(opened.notices().isEmpty());
        opened.notices().forEach(n -> assertTrue(text().contains(n), text()));
    }

    @Test
    void openedCrystal_isKept_andRemovedOnTheSecondClick() throws IOException {
        drop(write("one.cif", TWO_USABLE_ONE_NOT.substring(0, TWO_USABLE_ONE_NOT.indexOf("data_two"))));
        assertEquals("First salt", shown());
        Screen.type(frame, "keep as", "Copper");
        assertFalse(Screen.find(frame, "Keep on my shelf", JButton.class).isEnabled());
        Screen.type(frame, "keep as", "Salt of the works");
        Screen.click(frame, "Keep on my shelf");
        assertEquals("Salt of the works", shown());
        Path kept = folder.resolve("salt-of-the-works.cif");
        assertTrue(Files.exists(kept));
        assertTrue(text().contains(kept.toString()), text());
        Screen.click(frame, "Remove from my shelf");
        assertTrue(Files.exists(kept));
        Screen.click(frame, "Remove from my shelf");
        assertFalse(Files.exists(kept));
    }

    @Test
    void keptName_isNeverOverwritten() throws IOException {
        UserFolder.keep(CrystalShelf.find("gold").orElseThrow(), "Mine");
        byte[] was = Files.readAllBytes(folder.resolve("mine.cif"));
        drop(write("one.cif", TWO_USABLE_ONE_NOT.substring(0, TWO_USABLE_ONE_NOT.indexOf("data_two"))));
        Screen.type(frame, "keep as", "Mine");
        Screen.click(frame, "Keep on my shelf");
        assertTrue(
                Screen.find(frame, "keep note", javax.swing.JLabel.class)
                        .getText()
                        .contains("another"),
                "the reason is said");
        assertEquals(
                new String(was, StandardCharsets.UTF_8),
                Files.readString(folder.resolve("mine.cif"), StandardCharsets.UTF_8));
    }

    @Test
    void list_isSearchedTogether() throws IOException {
        Screen.click(frame, "Candidates…");
        JFrame lists = Screen.window("candidates window");
        Screen.type(lists, "list name", "Bearing metals");
        Screen.click(lists, "New list");
        Screen.click(lists, "Add the present crystal");
        Screen.pick(frame, "Austenite");
        Screen.click(lists, "Add the present crystal");
        Screen.pick(frame, "Periclase");
        Screen.click(lists, "Add the present crystal");
        CandidateList kept = UserFolder.lists().find("Bearing metals").orElseThrow();
        assertEquals(
                List.of("Copper", "Austenite", "Periclase"),
                kept.candidates().stream().map(c -> c.name()).toList());
        Screen.click(lists, "Use this list");
        assertEquals("Bearing metals", shown());
        assertTrue(text().contains("Copper, Austenite, Periclase"), text());
        Screen.click(frame, "Find spots");
        Screen.await(() -> Sitting.of(image).measured().isPresent());
        Screen.click(frame, "Find orientation");
        Screen.await(() -> Sitting.of(image).chosen().isPresent());
        JTable table = Screen.find(frame, "solutions", JTable.class);
        assertEquals(6, table.getColumnCount());
        // Which of the two is first is a matter of chance: their cells differ by less than the told error of the scale.
        assertEquals(Set.of("Copper", "Austenite"), Set.of(table.getValueAt(0, 0), table.getValueAt(1, 0)));
        assertEquals("Bearing metals", shown());
        List<Double> scores =
                Sitting.of(image).solutions().stream().map(s -> s.score()).toList();
        assertEquals(scores.stream().sorted((a, b) -> Double.compare(b, a)).toList(), scores);
        Screen.type(lists, "list name", "Soft metals");
        Screen.click(lists, "Rename");
        assertTrue(UserFolder.lists().find("Bearing metals").isEmpty());
        Screen.click(lists, "Delete list");
        assertTrue(UserFolder.lists().find("Soft metals").isPresent());
        Screen.click(lists, "Delete list");
        assertTrue(UserFolder.lists().find("Soft metals").isEmpty());
    }

    @Test
    void typedIn_byType() {
        Screen.click(frame, "Type in…");
        JFrame typing = Screen.window("type-in window");
        Screen.type(typing, "element Cu", "Ag");
        assertFalse(Screen.find(typing, "Use", JButton.class).isEnabled());
        Screen.type(typing, "edge a", "four");
        assertFalse(Screen.find(typing, "Use", JButton.class).isEnabled());
        Screen.onEventThread(() -> {
            Screen.find(typing, "structure type", javax.swing.JComboBox.class).setSelectedItem(StructureType.of("A2"));
            return null;
        });
        assertEquals("Ag", Screen.find(typing, "element W", JTextField.class).getText(), "what was typed stays");
        Screen.onEventThread(() -> {
            Screen.find(typing, "structure type", javax.swing.JComboBox.class).setSelectedItem(StructureType.of("A1"));
            return null;
        });
        Screen.type(typing, "edge a", "4.086");
        Screen.click(typing, "Use");
        assertEquals("Ag (A1)", shown());
        assertTrue(text().contains("10.5"), text());
    }

    @Test
    void typedIn_byCellAndSites() {
        Screen.click(frame, "Type in…");
        JFrame typing = Screen.window("type-in window");
        JTable sites = Screen.onEventThread(() -> {
            Screen.find(typing, "ways", javax.swing.JTabbedPane.class).setSelectedIndex(1);
            return Screen.find(typing, "sites", JTable.class);
        });
        Screen.type(typing, "space group", "p42/mnm");
        assertTrue(Screen.find(typing, "space group read", javax.swing.JLabel.class)
                .getText()
                .contains("P 42/m n m (No. 136"));
        Screen.type(typing, "cell a", "4.594");
        Screen.type(typing, "cell c", "2.959");
        site(sites, 0, "Ti", "0", "0", "0");
        site(sites, 1, "O", "0.305", "0.305", "x");
        assertTrue(typed(typing).contains("row 2"), typed(typing));
        assertFalse(Screen.find(typing, "Keep on my shelf", JButton.class).isEnabled());
        Screen.onEventThread(() -> {
            sites.editCellAt(1, 3);
            ((JTextField) sites.getEditorComponent()).setText("1/0");
            return null;
        });
        assertTrue(typed(typing).contains("row 2"), "checked as typed: " + typed(typing));
        Screen.onEventThread(() -> {
            ((JTextField) sites.getEditorComponent()).setText("0");
            return null;
        });
        assertTrue(typed(typing).contains("g/cm³"), "checked as typed: " + typed(typing));
        Screen.onEventThread(() -> sites.getCellEditor().stopCellEditing());
        Screen.type(typing, "crystal name", "Rutile, typed");
        assertTrue(typed(typing).contains("O2 Ti;  4.247 g/cm³"), typed(typing));
        Screen.click(typing, "Keep on my shelf");
        assertEquals("Rutile, typed", shown());
        assertTrue(Files.exists(folder.resolve("rutile-typed.cif")));
    }

    private static String typed(JFrame typing) {
        return Screen.onEventThread(
                () -> Screen.find(typing, "typed crystal", JTextPane.class).getText());
    }

    private static void site(JTable sites, int row, String... texts) {
        Screen.onEventThread(() -> {
            for (int column = 0; column < texts.length; column++) {
                sites.setValueAt(texts[column], row, column);
            }
            return null;
        });
        Screen.settle();
    }

    private static void select(JList<?> list, int index) {
        Screen.onEventThread(() -> {
            list.setSelectedIndex(index);
            return null;
        });
    }

    private Path write(String name, String text) throws IOException {
        return Files.writeString(files.resolve(name), text, StandardCharsets.UTF_8);
    }

    private void drop(Path file) {
        Screen.drop(frame, file);
    }

    private String shown() {
        return Screen.onEventThread(() -> {
            JList<?> offers = Screen.popup("crystal offers", JList.class);
            return offers != null && offers.isShowing()
                    ? ((io.github.zonewright.imagej.session.CrystalOffer) offers.getSelectedValue()).name()
                    : Screen.find(frame, "crystal", JTextField.class).getText();
        });
    }

    private String text() {
        return Screen.onEventThread(
                () -> Screen.find(frame, "crystal text", JTextPane.class).getText());
    }
}
