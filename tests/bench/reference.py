"""The same work as engine.ts, as a competent user of NumPy and SciPy would write it: vectorised over
devices, conditions and draws. Reads the packed blocks and writes times and numbers as JSON."""

import json
import resource
import sys
from pathlib import Path

import numpy as np
from scipy import special, stats

folder = Path(sys.argv[1])
plan = json.loads((folder / "plan.json").read_text())
V = np.array(plan["biases"])
P, GAMMA = 0.99, 0.95
SHARED = (1 + GAMMA) / 2
PROBABILITIES = [0, 0.001, 0.005, 0.01, 0.025] + [i / 20 for i in range(1, 20)] + [0.975, 0.99, 0.995, 0.999, 1]
DRAWS = 100_000
spent = {}


def cpu():
    usage = resource.getrusage(resource.RUSAGE_SELF)
    return usage.ru_utime + usage.ru_stime


class measured:
    def __init__(self, name):
        self.name = name

    def __enter__(self):
        self.start = cpu()

    def __exit__(self, *_):
        spent[self.name] = spent.get(self.name, 0) + cpu() - self.start


def model(p, rows):
    """Capacitance and what its derivatives are made of, for parameters (rows, 4) with ln V_j."""
    x = V * np.exp(-p[:, 1:2])
    logarithm = np.log1p(x)
    power = np.exp(-p[:, 2:3] * logarithm)
    return x, logarithm, power, p[:, 3:4] + p[:, 0:1] * power


def fit(c):
    """Levenberg–Marquardt in relative error for all devices at once; finished ones drop out."""
    scale = c.max(axis=1, keepdims=True)
    y = c / scale
    weight = 1 / y
    high = np.array([np.inf, np.log(20), 2.5, 0]) * np.ones((len(y), 1))
    high[:, 3] = y.min(axis=1) * (1 - 1e-9)
    low = np.array([1e-12, np.log(0.05), 0.1, 0])
    p = np.empty((len(y), 4))
    p[:] = fit_mean(y.mean(axis=0))
    damping = np.full(len(y), 1e-5)
    result = np.empty_like(p)
    active = np.arange(len(y))
    p = np.clip(p, low, high)
    x, logarithm, power, value = model(p, active)
    residual = value * weight - 1
    cost = (residual**2).sum(axis=1)
    for _ in range(200):
        relative = power * weight
        jacobian = np.empty((len(p), len(V), 4))
        jacobian[:, :, 0] = relative
        jacobian[:, :, 1] = p[:, 0:1] * p[:, 2:3] * relative * x / (1 + x)
        jacobian[:, :, 2] = -p[:, 0:1] * relative * logarithm
        jacobian[:, :, 3] = weight
        transposed = jacobian.transpose(0, 2, 1)
        normal = transposed @ jacobian
        gradient = (transposed @ residual[:, :, None])[:, :, 0]
        held = ((p <= low) & (gradient > 0)) | ((p >= high) & (gradient < 0))
        diagonal = np.einsum("ijj->ij", normal)
        damped = normal.copy()
        np.einsum("ijj->ij", damped)[:] = diagonal * (1 + damping[:, None])
        damped[held] = 0
        damped.transpose(0, 2, 1)[held] = 0
        np.einsum("ijj->ij", damped)[held] = 1
        step = np.linalg.solve(damped, -np.where(held, 0, gradient)[:, :, None])[:, :, 0]
        trial = np.clip(p + step, low, high)
        tx, tlogarithm, tpower, tvalue = model(trial, active)
        tresidual = tvalue * weight - 1
        tcost = (tresidual**2).sum(axis=1)
        better = tcost <= cost
        moved = np.abs(trial - p).max(axis=1)
        done = np.where(better, (cost - tcost <= 1e-8 * cost) | (moved < 1e-9), (moved < 1e-11) | (damping > 1e12))
        for old, new in ((p, trial), (x, tx), (logarithm, tlogarithm), (power, tpower), (residual, tresidual)):
            old[better] = new[better]
        cost = np.where(better, tcost, cost)
        damping = np.where(better, np.maximum(1e-12, damping / 20), damping * 8)
        if done.any():
            result[active[done]] = p[done]
            keep = ~done
            if not keep.any():
                break
            active, p, x, logarithm, power, residual, cost, damping, weight, high = (
                a[keep] for a in (active, p, x, logarithm, power, residual, cost, damping, weight, high)
            )
    result[:, 1] = np.exp(result[:, 1])
    result[:, [0, 3]] *= scale
    return result


def fit_mean(y):
    """Where all devices begin: the fit of the mean sweep by SciPy's own bounded least squares."""
    from scipy.optimize import least_squares

    def error(p):
        return (p[3] + p[0] * (1 + V / np.exp(p[1])) ** -p[2]) / y - 1

    starts = [(0.6, 0.35), (0.7, 0.5), (1.5, 1.0), (4, 1.8)]
    bounds = ([1e-12, np.log(0.05), 0.1, 0], [np.inf, np.log(20), 2.5, y.min()])
    fits = [least_squares(error, [y[0], np.log(vj), m, 1e-6], bounds=bounds, x_scale="jac") for vj, m in starts]
    return min(fits, key=lambda f: f.cost).x


def nested_sums(y, lots, wafers):
    """n, mean and squares of every wafer for all conditions at once; rows sorted by lot and wafer."""
    starts = np.flatnonzero(np.r_[True, (lots[1:] != lots[:-1]) | (wafers[1:] != wafers[:-1])])
    n = np.diff(np.r_[starts, len(y)])
    mean = np.add.reduceat(y, starts) / n[:, None]
    squares = np.add.reduceat((y - np.repeat(mean, n, axis=0)) ** 2, starts)
    return n, mean, squares, lots[starts]


def components(n, mean, squares, lot_of):
    """Nested analysis of variance with unbalanced coefficients (Searle, Casella and McCulloch)."""
    _, index = np.unique(lot_of, return_inverse=True)
    a, b, total = index.max() + 1, len(n), n.sum()
    per_lot = np.zeros(a)
    np.add.at(per_lot, index, n)
    lot_mean = np.zeros((a, mean.shape[1]))
    np.add.at(lot_mean, index, n[:, None] * mean)
    lot_mean /= per_lot[:, None]
    grand = (per_lot[:, None] * lot_mean).sum(axis=0) / total
    within = squares.sum(axis=0) / (total - b)
    wafer = (n[:, None] * (mean - lot_mean[index]) ** 2).sum(axis=0) / (b - a)
    lot = (per_lot[:, None] * (lot_mean - grand) ** 2).sum(axis=0) / (a - 1)
    square_sum = np.zeros(a)
    np.add.at(square_sum, index, n**2)
    share = (square_sum / per_lot).sum()
    k1 = (total - share) / (b - a)
    k2 = (share - (n**2).sum() / total) / (a - 1)
    k3 = (total - (per_lot**2).sum() / total) / (a - 1)
    wafer_variance = (wafer - within) / k1
    return grand, (lot - within - k2 * wafer_variance) / k3, wafer_variance, within


def strata(n, mean, squares, lot_of):
    """Unweighted means at both levels: variances, degrees and shares of the three strata."""
    _, index, wafers = np.unique(lot_of, return_inverse=True, return_counts=True)
    a, b = len(wafers), len(n)
    lot_mean = np.zeros((a, mean.shape[1]))
    np.add.at(lot_mean, index, mean)
    lot_mean /= wafers[:, None]
    inverse = np.zeros(a)
    np.add.at(inverse, index, 1 / n)
    inverse /= wafers
    h = ((wafers - 1) * inverse).sum() / (b - a)
    inverse_wafers, inverse_lot = (1 / wafers).mean(), (inverse / wafers).mean()
    degrees = (a - 1, b - a, n.sum() - b)
    variances = (
        lot_mean.var(axis=0, ddof=1),
        ((mean - lot_mean[index]) ** 2).sum(axis=0) / degrees[1],
        squares.sum(axis=0) / degrees[2],
    )
    return lot_mean.mean(axis=0), a, variances, degrees, (1, 1 - inverse_wafers, 1 - inverse_lot - h * (1 - inverse_wafers))


def anderson_darling(y, lots):
    """Of residuals about the lot mean, √(n/(n−1)) wider, for all conditions at once."""
    starts = np.flatnonzero(np.r_[True, lots[1:] != lots[:-1]])
    n = np.diff(np.r_[starts, len(y)])
    mean = np.add.reduceat(y, starts) / n[:, None]
    r = (y - np.repeat(mean, n, axis=0)) * np.repeat(np.sqrt(n / (n - 1)), n)[:, None]
    z = np.sort((r - r.mean(axis=0)) / r.std(axis=0, ddof=1), axis=0)
    count = len(z)
    i = (2 * np.arange(1, count + 1) - 1)[:, None]
    square = -count - (i * (special.log_ndtr(z) + special.log_ndtr(-z[::-1]))).sum(axis=0) / count
    return square * (1 + 0.75 / count + 2.25 / count**2)


def lots_margin(parts, random):
    """γ-quantile of the generalized pivotal quantity by Monte Carlo, as the paper does it."""
    _, a, variances, degrees, shares = parts
    u = [d / random.chisquare(d, DRAWS) for d in degrees]
    normal = random.standard_normal(DRAWS) / np.sqrt(a)
    z = stats.norm.ppf(P)
    margins = []
    for lot, wafer, device in zip(*variances):
        of_lots = lot * u[0]
        total = of_lots + shares[1] * wafer * u[1] + shares[2] * device * u[2]
        margins.append(np.quantile(normal * np.sqrt(of_lots) + z * np.sqrt(total), SHARED))
    return np.array(margins)


def pairs(low, high):
    return np.exp(np.stack([low, high], axis=1)).ravel()


def work():
    spent.clear()
    random = np.random.default_rng(1)
    results = {name: [] for name in ("fits", "means", "deviations", "lotComponents", "darling", "lots", "normal", "order", "sigma")}
    with measured("distributions"):
        names = {key: np.concatenate([d[key] for d in plan["devices"]]) for key in ("lot", "wafer")}
        order = np.lexsort((names["wafer"], names["lot"]))
        lots, wafers = names["lot"][order], names["wafer"][order]
    for temperature in plan["temperatures"]:
        with measured("read"):
            blocks = [
                np.frombuffer((folder / f"{temperature}-{b}.bin").read_bytes(), dtype="<f8").reshape(-1, len(V))
                for b in range(plan["blocks"])
            ]
        for block in blocks:
            with measured("fits"):
                found = fit(block)
            results["fits"].append(found.ravel())
        with measured("distributions"):
            y = np.log(np.concatenate(blocks)[order])
            n = len(y)
            sums = nested_sums(y, lots, wafers)
            grand, lot_variance, _, _ = components(*sums)
            deviation = y.std(axis=0, ddof=1)
            skewness = stats.skew(y, axis=0)
            y_sorted = np.sort(y, axis=0)
            quantiles = np.quantile(y_sorted, PROBABILITIES, axis=0, method="median_unbiased")
            darling = anderson_darling(y, lots)
        with measured("lots"):
            parts = strata(*sums)
            margin = lots_margin(parts, random)
            results["lots"].append(pairs(parts[0] - margin, parts[0] + margin))
        with measured("normal"):
            factor = stats.nct.ppf(SHARED, n - 1, stats.norm.ppf(P) * np.sqrt(n)) / np.sqrt(n)
            results["normal"].append(pairs(grand - factor * deviation, grand + factor * deviation))
        with measured("order"):
            rank = int(stats.binom.ppf(1 - SHARED, n, 1 - P))
            while stats.binom.sf(rank - 1, n, 1 - P) < SHARED:
                rank -= 1
            results["order"].append(pairs(y_sorted[rank - 1], y_sorted[n - rank]))
        with measured("sigma"):
            results["sigma"].append(pairs(grand - 4 * deviation, grand + 4 * deviation))
        for name, value in (("means", grand), ("deviations", deviation), ("lotComponents", lot_variance), ("darling", darling)):
            results[name].append(value)
    return dict(spent), {k: np.concatenate(v).tolist() for k, v in results.items()}


first, _ = work()
second, numbers = work()
(folder / "reference.json").write_text(json.dumps({"first": first, "spent": second, "results": numbers}))
