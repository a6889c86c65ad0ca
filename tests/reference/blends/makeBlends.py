"""Blends with the values scipy fits to them. usage: python3 makeBlends.py > blends.json (numpy 1.24 or later, scipy 1.10 or later).

Each case: a straight continuum with two to four Gaussians and seeded noise, fitted by scipy.optimize.curve_fit (Levenberg-Marquardt, absolute_sigma)
from starts that are off by a few tenths of a width. Parameters: flux, centre, sigma of each line, then offset and slope about the middle of the window.
"""
import json

import numpy as np
from scipy.optimize import curve_fit

CASES = {
    "a doublet 1.5 FWHM apart": (0.2, [(100, 5000.0, 0.45), (60, 5001.6, 0.45)]),
    "a doublet 1.0 FWHM apart": (0.2, [(300, 5000.0, 0.45), (180, 5001.06, 0.45)]),
    "a faint line on a bright wing": (0.2, [(1000, 5000.0, 0.5), (25, 5002.2, 0.5)]),
    "three lines of different width": (0.15, [(80, 4999.0, 0.4), (120, 5000.9, 0.7), (60, 5003.0, 0.45)]),
    "four lines in a row": (0.1, [(50, 4998.0, 0.3), (90, 4999.1, 0.33), (40, 5000.3, 0.3), (75, 5001.5, 0.36)]),
    "absorption beside emission": (0.2, [(90, 5000.0, 0.5), (-40, 5002.0, 0.45)]),
}


def model(x, *p):
    y = p[-2] + p[-1] * (x - x.mean())
    for k in range(0, len(p) - 2, 3):
        y = y + p[k] / (abs(p[k + 2]) * np.sqrt(2 * np.pi)) * np.exp(-0.5 * ((x - p[k + 1]) / p[k + 2]) ** 2)
    return y


def main():
    random = np.random.default_rng(20261201)
    out = []
    for name, (step, lines) in CASES.items():
        x = np.round(np.arange(4993.0, 5008.0, step), 6)
        true = [v for line in lines for v in line] + [0.1, 0.02]
        err = np.full_like(x, 1.0)
        y = np.round(model(x, *true) + err * random.normal(size=x.size), 6)
        start = [v for f, c, s in lines for v in (0.8 * f, c + 0.2 * s, 1.15 * s)] + [0.0, 0.0]
        p, cov = curve_fit(model, x, y, start, sigma=err, absolute_sigma=True, ftol=1e-14, xtol=1e-14, gtol=1e-14, maxfev=20000)
        out.append(
            {
                "name": name,
                "x": x.tolist(),
                "y": y.tolist(),
                "noise": 1.0,
                "start": start,
                "parameters": [float(f"{v:.9g}") for v in p],
                "errors": [float(f"{v:.6g}") for v in np.sqrt(np.diag(cov))],
                "chi2": float(f"{((y - model(x, *p)) ** 2).sum():.9g}"),
            }
        )
    print(json.dumps(out))


main()
