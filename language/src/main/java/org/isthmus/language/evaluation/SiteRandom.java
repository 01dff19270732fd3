package org.isthmus.language.evaluation;

/**
 * Random numbers that are functions of seed and site alone, so that neither order nor threads matter: the output function
 * of SplitMix64 (Steele, Lea & Flood, OOPSLA 2014) over a counter made of both.
 */
final class SiteRandom {
    private static final double UNIT = 0x1.0p-53;

    private SiteRandom() {}

    /** Evenly distributed on [0, 1). */
    static double uniform(double seed, long site) {
        return (bits(seed, site, 0) >>> 11) * UNIT;
    }

    /** Normally distributed with standard deviation 1, by Box and Muller, Ann. Math. Stat. 29, 610 (1958). */
    static double normal(double seed, long site) {
        double radius = ((bits(seed, site, 1) >>> 11) + 1) * UNIT;
        double angle = (bits(seed, site, 2) >>> 11) * UNIT;
        return Math.sqrt(-2 * Math.log(radius)) * Math.cos(2 * Math.PI * angle);
    }

    private static long bits(double seed, long site, int stream) {
        long state = mix(Double.doubleToLongBits(seed + 0.0) ^ 0x9E3779B97F4A7C15L);
        state = mix(state + 0x9E3779B97F4A7C15L * (site + 1));
        return mix(state + 0xD1B54A32D192ED03L * (stream + 1));
    }

    private static long mix(long z) {
        long a = (z ^ (z >>> 30)) * 0xBF58476D1CE4E5B9L;
        long b = (a ^ (a >>> 27)) * 0x94D049BB133111EBL;
        return b ^ (b >>> 31);
    }
}
