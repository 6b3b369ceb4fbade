package io.github.zonewright.imagej.workbench;

import java.awt.datatransfer.DataFlavor;
import java.awt.datatransfer.UnsupportedFlavorException;
import java.io.File;
import java.io.IOException;
import java.util.List;
import java.util.function.Consumer;
import javax.swing.TransferHandler;

/** Takes a file that is dropped on a window. */
final class FileDrop extends TransferHandler {
    private static final long serialVersionUID = 1L;

    private final transient Consumer<File> onFile;

    FileDrop(Consumer<File> onFile) {
        this.onFile = onFile;
    }

    @Override
    public boolean canImport(TransferSupport support) {
        return support.isDataFlavorSupported(DataFlavor.javaFileListFlavor);
    }

    @Override
    public boolean importData(TransferSupport support) {
        if (!canImport(support)) {
            return false;
        }
        try {
            List<?> files = (List<?>) support.getTransferable().getTransferData(DataFlavor.javaFileListFlavor);
            if (files.isEmpty() || !(files.get(0) instanceof File file)) {
                return false;
            }
            onFile.accept(file);
            return true;
        } catch (UnsupportedFlavorException | IOException e) {
            return false;
        }
    }
}
