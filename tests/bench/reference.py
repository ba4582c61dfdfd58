"""Times scipy's curve_fit on the series of the bench and prints JSON; run by scripts/bench.mjs."""
import json
import statistics
import sys
import time
import warnings

import numpy as np
import scipy
from scipy.optimize import curve_fit

warnings.simplefilter("ignore")
series = json.load(open(sys.argv[1]))
x = np.array(series["x"])
y = np.array(series["y"])


def model(x, T0, c, Bmax, K):
    kx = K * x
    return T0 + c * x + Bmax * kx / (1 + kx)


def jacobian(x, T0, c, Bmax, K):
    t = 1 / (1 + K * x)
    return np.column_stack([np.ones_like(x), x, K * x * t, Bmax * x * t * t])


def microseconds(calls, work, rounds=9):
    for _ in range(calls):
        work()
    times = []
    for _ in range(rounds):
        start = time.perf_counter()
        for _ in range(calls):
            work()
        times.append(1e6 * (time.perf_counter() - start) / calls)
    return statistics.median(times)


near = [30.9, -3.7, 3.2, 4.5]
print(json.dumps({
    "version": scipy.__version__,
    "near": microseconds(300, lambda: curve_fit(model, x, y, p0=near, jac=jacobian)),
    "default": microseconds(100, lambda: curve_fit(model, x, y)),
    "estimates": list(curve_fit(model, x, y, p0=near, jac=jacobian)[0]),
}))
