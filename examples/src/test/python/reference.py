"""Reference figures of a few examples, independent of the solver: the tight-binding matrices are written down by hand
and solved with NumPy. Leads end in closed forms (chains, separable strips) or in a plain eigenproblem of the lead's
waves. Run it in this folder: python3 reference.py"""
import os
import numpy as np
from scipy import linalg

# the exact SI of 2019; electron mass of CODATA 2018
H_SI, E_SI, ME_SI = 6.62607015e-34, 1.602176634e-19, 9.1093837015e-31
HB2_ME = (H_SI / (2 * np.pi))**2 / ME_SI / E_SI * 1e18  # hbar^2/m_e, eV nm^2
HBAR = H_SI / (2 * np.pi) / E_SI * 1e15  # eV fs
OUT = os.path.join(os.path.dirname(os.path.abspath(__file__)), "../resources/org/isthmus/examples/reference")


def write(name, column, rows):
    with open(os.path.join(OUT, name + ".csv"), "w") as f:
        f.write("energy (eV)," + column + "\n")
        for e, v in rows:
            f.write(f"{float(e)!r},{float(v)!r}\n")


def lead(h, t, energy):
    """Self-energy of a half-infinite lead of cells h, coupled outward by t (body to first cell alike)."""
    n = len(h)
    a = np.block([[np.zeros((n, n)), np.eye(n)], [-t.conj().T, energy * np.eye(n) - h]]).astype(complex)
    b = np.block([[np.eye(n), np.zeros((n, n))], [np.zeros((n, n)), t]]).astype(complex)
    lam, vec = linalg.eig(a, b)
    out = []
    for k in range(2 * n):
        psi = vec[:n, k]
        if not np.isfinite(lam[k]) or abs(lam[k]) > 1 + 1e-8:
            continue
        if abs(lam[k]) < 1 - 1e-8:
            out.append((lam[k], psi))
        elif np.imag(psi.conj() @ t @ psi * lam[k]) < 0:  # v = 2 Re(i lambda psi* t psi) outward
            out.append((lam[k], psi))
    assert len(out) == n, (energy, len(out), n)
    u = np.array([p for _, p in out]).T
    step = u @ np.diag([v for v, _ in out]) @ np.linalg.inv(u)
    return t @ step


def transmission(h, sigmas, energy):
    n = len(h)
    g = np.linalg.inv(energy * np.eye(n) - h - sum(sigmas))
    gam = [1j * (s - s.conj().T) for s in sigmas]
    return np.trace(gam[1] @ g @ gam[0] @ g.conj().T).real


def chain_sigma(t, ec, energy):
    """t exp(ika) at the end of a chain with on-site ec + 2t and hopping -t."""
    c = (ec + 2 * t - energy) / (2 * t)
    return -t * (c - 1j * np.sqrt(complex(1 - c * c))) if abs(c) <= 1 else -t * (c - np.sign(c) * np.sqrt(c * c - 1))


def chain(u, t, energy):
    n = len(u)
    h = np.diag(2 * t + u) - t * (np.eye(n, k=1) + np.eye(n, k=-1))
    s = [np.zeros((n, n), complex), np.zeros((n, n), complex)]
    s[0][0, 0] = s[1][n - 1, n - 1] = chain_sigma(t, 0, energy)
    return transmission(h, s, energy)


def strip(cells, hop, energy):
    """Cells from left to right, coupled by hop(left, right) = h[n, n + 1]; the leads repeat the first and the last."""
    n, w = len(cells), len(cells[0][0])
    h = np.zeros((n * w, n * w), complex)
    for i, (c, _) in enumerate(cells):
        h[i * w:(i + 1) * w, i * w:(i + 1) * w] = c
        if i + 1 < n:
            h[i * w:(i + 1) * w, (i + 1) * w:(i + 2) * w] = hop
            h[(i + 1) * w:(i + 2) * w, i * w:(i + 1) * w] = hop.conj().T
    s = [np.zeros_like(h), np.zeros_like(h)]
    s[0][:w, :w] = lead(cells[0][1], hop.conj().T, energy)
    s[1][-w:, -w:] = lead(cells[-1][1], hop, energy)
    return transmission(h, s, energy)


def barrier():
    t = HB2_ME / (2 * 0.067 * 0.25**2)
    x = 0.25 * np.arange(101)
    u = np.where((x >= 12 - 1e-6) & (x < 14 - 1e-6), 0.23, 0.0)
    write("BarrierWire.Spectrum", "source>drain",
          [(e, chain(u, t, e)) for e in np.linspace(0.010, 0.600, 119)[::7]])


def superlattice():
    t = HB2_ME / (2 * 0.067 * 0.25**2)
    x = 0.25 * np.arange(241)
    inside = (x >= 6 - 1e-6) & (x < 54 - 1e-6)
    phase = x - 6 - 8 * np.floor((x - 6 + 0.01) / 8)
    u = np.where(inside & (phase < 1.9 - 1e-6), 0.1, 0.0)
    # the adaptive axis always holds its two ends and halves of the way between
    ends = 0.005 + 0.245 * np.array([0, 0.25, 0.5, 0.75, 1])
    write("Filter.Bands", "source>drain", [(e, chain(u, t, e)) for e in ends])


def constriction():
    a, m = 4.0, 0.067
    t = HB2_ME / (2 * m * a * a)
    y = a * np.arange(-14, 15)
    x = a * np.arange(-35, 36)
    mass = m / HB2_ME * HBAR**2  # eV fs^2/nm^2
    across = 4 * t * np.eye(len(y)) - t * (np.eye(len(y), k=1) + np.eye(len(y), k=-1))
    cells = []
    for xx in x:
        v = 0.5 * mass * (0.006 / HBAR)**2 * y**2 * np.exp(-xx**2 / (2 * 30.0**2))
        cells.append((across + np.diag(v), across))
    hop = -t * np.eye(len(y))
    write("PointContact.Steps", "source>drain",
          [(e, strip(cells, hop, e)) for e in np.linspace(0.001, 0.020, 77)[[12, 32, 44]]])


def hall():
    a, m, b = 3.0, 0.067, 8e-3  # 1 T = 1e-3 V fs/nm^2
    t = HB2_ME / (2 * m * a * a)
    y = np.arange(31)
    cell = 4 * t * np.eye(31) - t * (np.eye(31, k=1) + np.eye(31, k=-1))
    # carriers have charge -q; the phase of a bond along x is linear in y, either sign: T is that of both
    hop = np.diag(-t * np.exp(1j * b * a * a / HBAR * y))
    cells = [(cell, cell)] * 21
    write("Bar.Plateaus", "source>drain",
          [(e, strip(cells, hop, e)) for e in np.linspace(0.007, 0.035, 29)[::5]])


def ribbon():
    a, t = 0.246, 2.7
    sites = []
    for i in range(-30, 30):
        for j in range(-3, 20):
            for k, dy in enumerate((0, a / np.sqrt(3))):
                x, y = a * i + a / 2 * j, a * np.sqrt(3) / 2 * j + dy
                if -1e-6 <= x <= 0.9 + 1e-6:
                    sites.append((x, y))
    period = a * np.sqrt(3)
    first = sorted([s for s in sites if -1e-6 <= s[1] < period - 1e-6], key=lambda s: (s[1], s[0]))
    w = len(first)
    p = np.array(first)

    def bonds(dy):
        d = np.hypot(p[:, None, 0] - p[None, :, 0], p[:, None, 1] - p[None, :, 1] - dy)
        return np.where(np.abs(d - a / np.sqrt(3)) < 1e-6, -t, 0.0)

    h, hop = bonds(0.0), bonds(period)
    energies = np.linspace(-1, 1, 41)[[0, 7, 15, 21, 30, 37]]
    write("Metallic.Gap", "lower>upper", [(e, strip([(h, h)] * 4, hop, e)) for e in energies])


def measured():
    t = HB2_ME / 2
    e0, re, im = np.array([[0, 0.010, -0.050], [0.05, 0.015, -0.045], [0.1, 0.018, -0.038], [0.2, 0.020, -0.030]]).T
    h = 2 * t * np.eye(5) - t * (np.eye(5, k=1) + np.eye(5, k=-1))
    rows = []
    for e in np.linspace(0.020, 0.140, 25):
        s = [np.zeros((5, 5), complex), np.zeros((5, 5), complex)]
        s[0][0, 0] = np.interp(e, e0, re) + 1j * np.interp(e, e0, im)
        s[1][4, 4] = -0.05j
        rows.append((e, transmission(h, s, e)))
    write("Measured.Spectrum", "tip>base", rows)


if __name__ == "__main__":
    for make in (barrier, superlattice, constriction, hall, ribbon, measured):
        make()
