"""The sums of the class odds, vectorised with NumPy: stars against nodes in blocks.

Reads one JSON object from standard input: node columns (absolute magnitudes, extinction ratios, densities, scatter) and
star columns (magnitudes, errors, parallaxes of good S/N). Prints stars per second and a check sum of the odds. Same
Gaussian sums as src/science/odds/star-fit.ts for two bands and a good parallax, single branch, without pruning.
"""

import json
import sys
import time

import numpy as np

BLOCK = 500


def main():
    given = json.load(sys.stdin)
    nodes = {name: np.array(values) for name, values in given["nodes"].items()}
    stars = {name: np.array(values) for name, values in given["stars"].items()}
    count = len(stars["parallax_mas"])
    # One untimed block first.
    odds_of(nodes, {name: values[:BLOCK] for name, values in stars.items()}, given["extinction"])
    start = time.perf_counter()
    total = 0.0
    for first in range(0, count, BLOCK):
        block = {name: values[first : first + BLOCK] for name, values in stars.items()}
        total += odds_of(nodes, block, given["extinction"]).sum()
    seconds = time.perf_counter() - start
    print(json.dumps({"starsPerSecond": count / seconds, "sum": total}))


def odds_of(nodes, stars, extinction):
    weights = [
        1 / (stars["sigma%d" % b][:, None] ** 2 + nodes["variance%d" % b][None, :]) for b in (0, 1)
    ]
    residuals = [
        stars["mag%d" % b][:, None] - nodes["mag%d" % b][None, :] - extinction["mean"] * nodes["ratio%d" % b][None, :]
        for b in (0, 1)
    ]
    ratios = [nodes["ratio%d" % b][None, :] for b in (0, 1)]
    s0 = sum(weights)
    s1 = sum(w * a for w, a in zip(weights, ratios))
    s2 = sum(w * a * a for w, a in zip(weights, ratios))
    r0 = sum(w * r for w, r in zip(weights, residuals))
    r1 = sum(w * r * a for w, r, a in zip(weights, residuals, ratios))
    rr = sum(w * r * r for w, r in zip(weights, residuals))
    narrowing = 1 / (1 + extinction["variance"] * s2)
    gain = extinction["variance"] * narrowing
    t0 = s0 - gain * s1 * s1
    x = (r0 - gain * s1 * r1) / t0
    chi2 = rr - gain * r1 * r1 - t0 * x * x
    modulus = 10 - 5 * np.log10(stars["parallax_mas"])[:, None]
    modulus_variance = (5 / np.log(10) * stars["parallax_sigma_mas"] / stars["parallax_mas"])[:, None] ** 2
    total = modulus_variance + nodes["scatter_variance"][None, :] + 1 / t0
    density = np.exp(-0.5 * (chi2 + (x - modulus) ** 2 / total)) / np.sqrt(total)
    weight = density * np.sqrt(weights[0] * weights[1] / t0 * narrowing) * nodes["density"][None, :]
    weight = np.nan_to_num(weight)
    classes = np.stack([weight[:, nodes["class_index"] == c].sum(axis=1) for c in range(10)], axis=1)
    return classes / np.maximum(classes.sum(axis=1, keepdims=True), 1e-300)


main()
