"""The main job scripted from general-purpose parts: what a competent analyst writes today.

Read a layer, project it to meters, find areas that share a vertex, row-standardize, compute Moran's I
with a permutation p, local Moran's I with conditional permutations, false-discovery adjustment and
classes, and write a FlatGeobuf layer. It shares no code with nearkin.

Prints one line of JSON: versions, results, and seconds for each stage. `total` counts from the first
line of this file, imports included.

    python3 whole_job.py LAYER FIELD OUT.fgb --permutations 999
"""
import time

START = time.perf_counter()

import argparse
import json
import platform
import warnings

import geopandas
import numpy as np
import scipy
import scipy.sparse as sparse

GLOBAL_BATCH = 32  # permutations multiplied at once
EXACT_DRAWS_BELOW = 5000  # areas up to which draws without replacement are affordable


class Stages:
    """Seconds since the last lap, by name of the stage."""

    def __init__(self):
        self.seconds = {}
        self.last = START

    def lap(self, name):
        now = time.perf_counter()
        self.seconds[name] = round(now - self.last, 3)
        self.last = now


def parse_arguments():
    parser = argparse.ArgumentParser(description=__doc__.splitlines()[0])
    parser.add_argument("layer")
    parser.add_argument("field")
    parser.add_argument("out", help="FlatGeobuf file to write")
    parser.add_argument("--permutations", type=int, default=999)
    return parser.parse_args()


def shared_vertex_links(geometry):
    """n x n matrix of ones where two areas have an outer vertex in common, to the millimeter."""
    rings, owners = [], []
    for area, shape in enumerate(geometry):
        parts = shape.geoms if shape.geom_type.startswith("Multi") else [shape]
        for part in parts:
            ring = np.asarray(part.exterior.coords)[:-1]
            rings.append(ring)
            owners.append(np.full(len(ring), area))
    owner = np.concatenate(owners)
    _, vertex = np.unique(np.round(np.vstack(rings), 3), axis=0, return_inverse=True)
    shape = (len(geometry), vertex.max() + 1)
    has_vertex = sparse.csr_matrix((np.ones(len(owner)), (owner, vertex.ravel())), shape=shape)
    has_vertex.data[:] = 1
    links = (has_vertex @ has_vertex.T).tocsr()
    links.setdiag(0)
    links.eliminate_zeros()
    links.data[:] = 1
    return links


def row_standardize(links):
    """Rows of weights that sum to 1, and the number of neighbors of each area."""
    neighbors = np.diff(links.indptr)
    return (sparse.diags(1 / np.maximum(neighbors, 1)) @ links).tocsr(), neighbors


def global_moran(z, weights, permutations):
    """Moran's I and its one-sided permutation p."""
    random = np.random.default_rng(1)
    scale = len(z) / weights.sum() / (z @ z)
    observed = scale * (z @ (weights @ z))
    at_least = 0
    for start in range(0, permutations, GLOBAL_BATCH):
        count = min(GLOBAL_BATCH, permutations - start)
        batch = np.empty((len(z), count))
        for column in range(count):
            batch[:, column] = random.permutation(z)
        drawn = scale * np.einsum("ij,ij->j", batch, weights @ batch)
        at_least += int((drawn >= observed).sum())
    return observed, (at_least + 1) / (permutations + 1)


def local_p(z, lag, neighbors, permutations):
    """One-sided p of each area; one table of draws serves all areas, shifted past the area itself."""
    random = np.random.default_rng(2)
    n, most = len(z), int(neighbors.max())
    if n < EXACT_DRAWS_BELOW:
        rows = [random.choice(n - 1, most, replace=False) for _ in range(permutations)]
        table = np.array(rows)
    else:
        table = random.integers(0, n - 1, (permutations, most))
    beyond = np.zeros(n, int)
    for area, count in enumerate(neighbors):
        if count == 0:
            continue
        others = table[:, :count]
        others = others + (others >= area)
        drawn = z[others].sum(1) / count
        at_least = int((drawn >= lag[area]).sum())
        beyond[area] = min(at_least, permutations - at_least)
    return (beyond + 1) / (permutations + 1)


def false_discovery(p):
    """Adjusted p of Benjamini & Hochberg (1995)."""
    order = np.argsort(p)
    steps = p[order] * len(p) / np.arange(1, len(p) + 1)
    adjusted = np.empty(len(p))
    adjusted[order] = np.minimum.accumulate(steps[::-1])[::-1]
    return adjusted


def classes(z, lag, q, level=0.05):
    """Class of each area in words."""
    high = np.where(lag > 0, "high among high", "high among low")
    low = np.where(lag > 0, "low among high", "low among low")
    return np.where(q > level, "no evidence", np.where(z > 0, high, low))


def main():
    warnings.filterwarnings("ignore")
    arguments = parse_arguments()
    stages = Stages()
    stages.lap("imports")
    layer = geopandas.read_file(arguments.layer)
    stages.lap("read")
    layer = layer.to_crs(layer.estimate_utm_crs())
    stages.lap("project")
    weights, neighbors = row_standardize(shared_vertex_links(layer.geometry))
    stages.lap("neighbors")
    values = layer[arguments.field].to_numpy(float)
    z = (values - values.mean()) / values.std()
    moran, moran_p = global_moran(z, weights, arguments.permutations)
    stages.lap("global")
    lag = weights @ z
    p = local_p(z, lag, neighbors, arguments.permutations)
    stages.lap("local")
    q = false_discovery(p)
    layer["z"], layer["lag"], layer["p"], layer["q"] = z, lag, p, q
    layer["class"] = classes(z, lag, q)
    stages.lap("adjust")
    layer.to_file(arguments.out, driver="FlatGeobuf")
    stages.lap("write")
    print(json.dumps({
        "versions": {
            "python": platform.python_version(),
            "geopandas": geopandas.__version__,
            "numpy": np.__version__,
            "scipy": scipy.__version__,
        },
        "areas": len(layer),
        "links": int(weights.nnz),
        "moranI": float(moran),
        "p": moran_p,
        "seconds": {**stages.seconds, "total": round(time.perf_counter() - START, 3)},
    }))


if __name__ == "__main__":
    main()
