"""The reference of the benchmark: a mass sweep as an ordinary script does it, with numpy and scipy.

One cubic spline for each waveform, then for every total mass: resample at the detector's rate, transform at
N = 2^17, divide by the noise, inverse transform, take the largest value. Reads one JSON request a line.
"""
import json
import sys
import time

import numpy as np
import scipy
import scipy.fft
from scipy.interpolate import CubicSpline

MSUN_S = 4.925490947641267e-6
RATE_HZ, N = 4096.0, 2**17


def noise(f):
    """Arun et al. 2005, PRD 71 084008: the curve A2."""
    x = f / 215.0
    return 1e-49 * (x**-4.14 - 5 * x**-2 + 111 * (1 - x**2 + x**4 / 2) / (1 + x**2 / 2))


def sweep(path, n, masses, f_low, f_high):
    data = np.fromfile(path).reshape(3, n)
    started, spent = time.perf_counter(), time.process_time()
    t = data[0]
    first, second = CubicSpline(t, data[1]), CubicSpline(t, data[2])
    f = np.arange(N // 2 + 1) * RATE_HZ / N
    weight = np.zeros(len(f))
    band = (f >= f_low) & (f <= f_high)
    weight[band] = 1 / noise(f[band])
    matches = []
    for mass in masses:
        k = mass * MSUN_S
        times = np.arange(t[0], t[-1], 1 / RATE_HZ / k)
        a = scipy.fft.rfft(first(times), N)
        b = scipy.fft.rfft(second(times), N)
        product = np.zeros(N, complex)
        product[: len(f)] = a * b.conj() * weight
        norms = np.sum(abs(a) ** 2 * weight) * np.sum(abs(b) ** 2 * weight)
        matches.append(float(abs(scipy.fft.ifft(product)).max() * N / np.sqrt(norms)))
    return {"seconds": time.perf_counter() - started, "cpuSeconds": time.process_time() - spent, "matches": matches}


def parse(path):
    started, spent = time.perf_counter(), time.process_time()
    table = np.loadtxt(path)
    return {"seconds": time.perf_counter() - started, "cpuSeconds": time.process_time() - spent, "sum": float(table.sum())}


for line in sys.stdin:
    request = json.loads(line)
    if request["do"] == "sweep":
        answer = sweep(request["path"], request["n"], request["masses"], request["fLowHz"], request["fHighHz"])
    elif request["do"] == "parse":
        answer = parse(request["path"])
    else:
        answer = {"python": sys.version.split()[0], "numpy": np.__version__, "scipy": scipy.__version__}
    print(json.dumps(answer), flush=True)
