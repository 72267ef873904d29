"""Peer: local counts with unequal weights in numpy: one table of draws for all areas, gathered area by area.

Usage: scripted_weighed.py JOB AREAS (the job of native_weighed; the first AREAS areas); prints milliseconds.
"""
import sys
import time

import numpy as np


def main(path, areas):
    with open(path, "rb") as file:
        n, all_areas, draws, _, _, permutations, links = np.fromfile(file, np.uint32, 7)
        values = np.fromfile(file, np.float64, n)
        observed = np.fromfile(file, np.float64, all_areas)
        weights = np.fromfile(file, np.float64, links)
        offsets = np.fromfile(file, np.uint32, all_areas + 1)
    generator = np.random.default_rng(1)
    begun = time.perf_counter()
    table = generator.integers(0, n - 1, size=(permutations, draws))
    for area in range(areas):
        row = weights[offsets[area]:offsets[area + 1]]
        others = table[:, :len(row)]
        sums = values[others + (others >= area)] @ row
        (sums >= observed[area]).sum()
        (sums <= observed[area]).sum()
    print((time.perf_counter() - begun) * 1e3)


main(sys.argv[1], int(sys.argv[2]))
