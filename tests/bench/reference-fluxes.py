"""The reference for fluxes: what a set of modes carries away, with numpy as an ordinary script does it.

Derivatives of every mode by the same 13-point stencil as the engine (one convolution a mode, shorter one-sided stencils at
the ends), then energy, angular and linear momentum as sums over neighbouring modes of whole arrays.
"""
import sys
import time

import numpy as np


def stencil(offsets):
    """Weights of a first derivative at 0 from samples at these places, for unit steps."""
    powers = np.vander(np.asarray(offsets, float), increasing=True).T
    return np.linalg.solve(powers, np.eye(len(offsets))[1])


def derivative(h, step, points=13):
    half = points // 2
    slope = np.convolve(h, stencil(range(-half, half + 1))[::-1], "same") / step
    for i in [*range(half), *range(len(h) - half, len(h))]:
        first = min(max(0, i - 4), len(h) - 9)
        slope[i] = stencil(np.arange(first, first + 9) - i) @ h[first : first + 9] / step
    return slope


def fluxes(h, step, l_max):
    news = {mode: derivative(x, step) for mode, x in h.items()}
    n = len(next(iter(h.values())))
    energy, j_plus_x, j_plus_y, j_z, p_z = (np.zeros(n) for _ in range(5))
    p_plus = np.zeros(n, complex)
    for (l, m), d in news.items():
        energy += abs(d) ** 2
        j_z += m * (h[l, m] * d.conj()).imag
        for m2, up in ((m + 1, 1), (m - 1, -1)):
            if (l, m2) in news:
                product = np.sqrt(l * (l + 1) - m * m2) * h[l, m] * news[l, m2].conj()
                j_plus_x += product.imag
                j_plus_y -= up * product.real
        for l2, size in ((l, np.sqrt((l - m) * (l + m + 1)) / (l * (l + 1))), (l - 1, b(l, -m)), (l + 1, -b(l + 1, m + 1))):
            if (l2, m + 1) in news:
                p_plus += size * d * news[l2, m + 1].conj()
        for l2, size in ((l, 2 * m / (l * (l + 1))), (l - 1, c(l, m)), (l + 1, c(l + 1, m))):
            if (l2, m) in news:
                p_z += size * (d * news[l2, m].conj()).real
    pi = np.pi
    return [energy / (16 * pi), j_plus_x / (32 * pi), j_plus_y / (32 * pi), j_z / (16 * pi), p_plus.real / (8 * pi), p_plus.imag / (8 * pi), p_z / (16 * pi)]


def b(l, m):
    return np.sqrt((l - 2) * (l + 2) * (l + m) * (l + m - 1) / ((2 * l - 1) * (2 * l + 1))) / (2 * l)


def c(l, m):
    return np.sqrt((l - 2) * (l + 2) * (l - m) * (l + m) / ((2 * l - 1) * (2 * l + 1))) / l


def run(path, samples, step, l_max):
    modes = [(l, m) for l in range(2, l_max + 1) for m in range(-l, l + 1)]
    data = np.fromfile(path).reshape(len(modes), 2, samples)
    h = {mode: re + 1j * im for mode, (re, im) in zip(modes, data)}
    started, spent = time.perf_counter(), time.process_time()
    found = fluxes(h, step, l_max)
    spent = time.process_time() - spent
    # What tells the same numbers: each flux at its middle and its sum.
    return {"seconds": time.perf_counter() - started, "cpuSeconds": spent, "middle": [float(x[samples // 2]) for x in found], "sum": [float(x.sum()) for x in found]}


if __name__ == "__main__":
    import json

    for line in sys.stdin:
        request = json.loads(line)
        print(json.dumps(run(request["path"], request["samples"], request["step"], request["lMax"])), flush=True)
