package org.isthmus.language.ide.cli;

import java.io.IOException;
import java.io.InputStream;
import java.io.UncheckedIOException;
import java.util.Properties;
import picocli.CommandLine.IVersionProvider;

/** The version of the tool, as the build wrote it. */
final class VersionText implements IVersionProvider {
    /** Such as {@code 0.1.0}. */
    static String number() {
        try (InputStream in = VersionText.class.getResourceAsStream("version.properties")) {
            Properties properties = new Properties();
            properties.load(in);
            return properties.getProperty("version");
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** Such as {@code isthmus 0.1.0}. */
    static String full() {
        return "isthmus " + number();
    }

    @Override
    public String[] getVersion() {
        return new String[] {full()};
    }
}
