package io.github.zonewright.document;

import java.util.Locale;
import java.util.Optional;
import java.util.regex.Pattern;

/**
 * Which image a record belongs to.
 *
 * @param fileName name of the file, without folders
 * @param width width in px
 * @param height height in px
 * @param sha256 SHA-256 of the pixels as 64 lower-case hexadecimal digits: row by row from the top, left to right, each as
 *     stored, most significant byte first
 */
public record ImageReference(String fileName, int width, int height, Optional<String> sha256) {

    private static final Pattern DIGEST = Pattern.compile("[0-9a-f]{64}");

    /**
     * Checks the values.
     *
     * @throws IllegalArgumentException if the name is blank or has a folder or a line end in it, the width or height is not
     *     above 0, or the digest is not 64 hexadecimal digits
     */
    public ImageReference {
        if (fileName.isBlank() || fileName.matches("(?s).*[/\\\\\\p{Cntrl}].*")) {
            throw new IllegalArgumentException(
                    "image file name: '" + fileName + "', expected the name of a file without folders");
        }
        if (width <= 0 || height <= 0) {
            throw new IllegalArgumentException(
                    "image size: " + width + " × " + height + " px, expected both above 0 px");
        }
        sha256 = sha256.map(digits -> digits.toLowerCase(Locale.ROOT));
        sha256.ifPresent(digits -> {
            if (!DIGEST.matcher(digits).matches()) {
                throw new IllegalArgumentException(
                        "SHA-256 of the pixels: '" + digits + "', expected 64 hexadecimal digits");
            }
        });
    }

    /**
     * An image of which the pixels are not vouched for.
     *
     * @param fileName name of the file, without folders
     * @param width width in px
     * @param height height in px
     * @return the reference
     * @throws IllegalArgumentException if the name is blank or has a folder in it, or the width or height is not above 0
     */
    public static ImageReference of(String fileName, int width, int height) {
        return new ImageReference(fileName, width, height, Optional.empty());
    }

    /**
     * The same image with the digest of its pixels.
     *
     * @param digits SHA-256 in hexadecimal digits
     * @return the reference
     * @throws IllegalArgumentException if the digest is not 64 hexadecimal digits
     */
    public ImageReference withSha256(String digits) {
        return new ImageReference(fileName, width, height, Optional.of(digits));
    }
}
