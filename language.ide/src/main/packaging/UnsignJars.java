import java.io.IOException;
import java.io.OutputStream;
import java.nio.file.DirectoryStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Enumeration;
import java.util.jar.Attributes;
import java.util.jar.JarFile;
import java.util.jar.Manifest;
import java.util.zip.ZipEntry;
import java.util.zip.ZipOutputStream;

/**
 * Takes the signatures off the jars in a folder, at packaging: Java verifies signed classes one by one at every start
 * and leaves them out of its archive of prepared classes, which more than doubles the time to the first answer. Started
 * as a source file.
 */
public final class UnsignJars {
    private UnsignJars() {}

    public static void main(String[] arguments) throws IOException {
        try (DirectoryStream<Path> jars = Files.newDirectoryStream(Path.of(arguments[0]), "*.jar")) {
            for (Path jar : jars) {
                if (signed(jar)) {
                    Path aside = jar.resolveSibling(jar.getFileName() + ".unsigned");
                    copyWithout(jar, aside);
                    Files.move(aside, jar, java.nio.file.StandardCopyOption.REPLACE_EXISTING);
                }
            }
        }
    }

    private static boolean signed(Path jar) throws IOException {
        try (JarFile file = new JarFile(jar.toFile(), false)) {
            return file.stream().anyMatch(e -> isSignature(e.getName()));
        }
    }

    private static boolean isSignature(String name) {
        return name.matches("META-INF/[^/]+\\.(SF|RSA|DSA|EC)");
    }

    private static void copyWithout(Path jar, Path target) throws IOException {
        try (JarFile file = new JarFile(jar.toFile(), false);
                OutputStream out = Files.newOutputStream(target);
                ZipOutputStream zip = new ZipOutputStream(out)) {
            Enumeration<? extends ZipEntry> entries = file.entries();
            while (entries.hasMoreElements()) {
                ZipEntry entry = entries.nextElement();
                if (isSignature(entry.getName())) {
                    continue;
                }
                ZipEntry copy = new ZipEntry(entry.getName());
                copy.setTime(entry.getTime());
                zip.putNextEntry(copy);
                if (entry.getName().equals(JarFile.MANIFEST_NAME)) {
                    withoutDigests(file.getManifest()).write(zip);
                } else {
                    file.getInputStream(entry).transferTo(zip);
                }
                zip.closeEntry();
            }
        }
    }

    /** The per-class sections of a signed jar's manifest hold digests. */
    private static Manifest withoutDigests(Manifest signed) {
        Manifest plain = new Manifest();
        plain.getMainAttributes().putAll(signed.getMainAttributes());
        signed.getEntries().forEach((name, section) -> {
            Attributes kept = new Attributes();
            section.forEach((key, value) -> {
                if (!key.toString().endsWith("-Digest")) {
                    kept.put(key, value);
                }
            });
            if (!kept.isEmpty()) {
                plain.getEntries().put(name, kept);
            }
        });
        return plain;
    }
}
