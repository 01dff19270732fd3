package org.isthmus.runtime.solve;

/** Plain numbers of one energy. */
record CoherentSolution(
        double energy,
        double[][] transmissions,
        double[] spectralTraces,
        int[] modes,
        LeadTraces.Correlators correlators,
        double[][] siteByLead,
        double[] siteTotal,
        double equationResidual)
        implements EnergySolution {
    @Override
    public int leadCount() {
        return transmissions.length;
    }

    @Override
    public double transmission(int from, int to) {
        return transmissions[from][to];
    }

    @Override
    public double spectralTrace(int lead) {
        return spectralTraces[lead];
    }

    @Override
    public double transmissionSquared(int from, int to) {
        return asked(correlators, "correlators").squares()[from][to];
    }

    @Override
    public double noiseTrace(int a, int b, int c, int d) {
        return asked(correlators, "correlators").noise()[a][b][c][d];
    }

    @Override
    public int openModes(int lead) {
        return modes[lead];
    }

    @Override
    public double[] siteSpectral(int lead) {
        return asked(siteByLead, "values per site")[lead].clone();
    }

    @Override
    public double[] siteSpectral() {
        return asked(siteTotal, "values per site").clone();
    }

    private static <T> T asked(T value, String what) {
        if (value == null) {
            throw new IllegalStateException("the solve was not asked for " + what);
        }
        return value;
    }
}
