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


def table_noise(table):
    """A measured curve: ln S linear in ln f between its rows."""
    log_f, log_s = np.log(table["f"]), np.log(table["psd"])
    return lambda f: np.exp(np.interp(np.log(f), log_f, log_s))


def sweep(path, n, masses, f_low, f_high, table=None):
    data = np.fromfile(path).reshape(3, n)
    started, spent = time.perf_counter(), time.process_time()
    t = data[0]
    first, second = CubicSpline(t, data[1]), CubicSpline(t, data[2])
    f = np.arange(N // 2 + 1) * RATE_HZ / N
    weight = np.zeros(len(f))
    band = (f >= f_low) & (f <= f_high)
    weight[band] = 1 / (noise if table is None else table_noise(table))(f[band])
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


def bank(path, lengths, mass, factors, f_low, f_high):
    """A fitting factor over a bank: one spline a template, then every template at every mass."""
    data = np.fromfile(path)
    started, spent = time.perf_counter(), time.process_time()
    records, at = [], 0
    for n in lengths:
        records.append((data[at : at + n], data[at + n : at + 2 * n]))
        at += 2 * n
    longest = max(t[-1] for t, _ in records) * max(factors) + records[0][0][-1]
    n = 2 ** int(np.ceil(np.log2(longest * mass * MSUN_S * RATE_HZ)))
    f = np.arange(n // 2 + 1) * RATE_HZ / n
    weight = np.zeros(len(f))
    band = (f >= f_low) & (f <= f_high)
    weight[band] = 1 / noise(f[band])

    def spectrum(spline, end, total):
        return scipy.fft.rfft(spline(np.arange(0, end, 1 / RATE_HZ / (total * MSUN_S))), n)

    splines = [(CubicSpline(t, h), t[-1]) for t, h in records]
    a = spectrum(*splines[0], mass)
    weighted, norm_a = a * weight, np.sum(abs(a) ** 2 * weight)
    best, where = 0.0, (0, 1.0)
    product = np.zeros(n, complex)
    for index, (spline, end) in enumerate(splines[1:]):
        for factor in factors:
            b = spectrum(spline, end, mass * factor)
            product[: len(f)] = weighted * b.conj()
            value = abs(scipy.fft.ifft(product)).max() * n / np.sqrt(norm_a * np.sum(abs(b) ** 2 * weight))
            if value > best:
                best, where = float(value), (index, factor)
    spent = time.process_time() - spent
    return {"seconds": time.perf_counter() - started, "cpuSeconds": spent, "best": best, "index": where[0], "factor": where[1]}


def parse(path):
    started, spent = time.perf_counter(), time.process_time()
    table = np.loadtxt(path)
    return {"seconds": time.perf_counter() - started, "cpuSeconds": time.process_time() - spent, "sum": float(table.sum())}


def write_arrays(npy, h5, rows, modes):
    """False where h5py is not there to write with."""
    table = np.random.default_rng(1).standard_normal((rows, 3))
    np.save(npy, table)
    try:
        import h5py
    except ImportError:
        return {"written": False}
    with h5py.File(h5, "w") as file:
        for mode in range(modes):
            file[f"mode{mode}"] = table + mode
    return {"written": True}


def load(read):
    """Columns of their own, as a computation takes them; the sum of their last numbers tells that they were read."""
    started, spent = time.perf_counter(), time.process_time()
    total = sum(float(np.ascontiguousarray(column)[-1]) for table in read() for column in table.T)
    return {"seconds": time.perf_counter() - started, "cpuSeconds": time.process_time() - spent, "sum": total}


def hdf5_tables(path, modes):
    import h5py

    with h5py.File(path, "r") as file:
        for mode in range(modes):
            yield file[f"mode{mode}"][()]


for line in sys.stdin:
    request = json.loads(line)
    if request["do"] == "sweep":
        answer = sweep(request["path"], request["n"], request["masses"], request["fLowHz"], request["fHighHz"], request.get("noise"))
    elif request["do"] == "bank":
        answer = bank(request["path"], request["lengths"], request["mass"], request["factors"], request["fLowHz"], request["fHighHz"])
    elif request["do"] == "parse":
        answer = parse(request["path"])
    elif request["do"] == "write-arrays":
        answer = write_arrays(request["npy"], request["h5"], request["rows"], request["modes"])
    elif request["do"] == "load-npy":
        answer = load(lambda: [np.load(request["npy"])])
    elif request["do"] == "load-hdf5":
        answer = load(lambda: hdf5_tables(request["h5"], request["modes"]))
    else:
        answer = {"python": sys.version.split()[0], "numpy": np.__version__, "scipy": scipy.__version__}
    print(json.dumps(answer), flush=True)
