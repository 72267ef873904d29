"""Peer: neighbors of points with scipy's k-d tree, the tree's making included.

Usage: scripted_neighbors.py POINTS nearest K | within DISTANCE
POINTS holds x0, y0, x1, y1, … as doubles; prints milliseconds, then the number of pairs or neighbors found.
"""
import sys
import time

import numpy as np
from scipy.spatial import cKDTree


def main(path, what, amount):
    points = np.fromfile(path, np.float64).reshape(-1, 2)
    begun = time.perf_counter()
    tree = cKDTree(points)
    if what == "nearest":
        _, found = tree.query(points, k=int(amount) + 1)
        count = found.shape[0] * int(amount)
    else:
        count = len(tree.query_pairs(float(amount), output_type="ndarray"))
    print((time.perf_counter() - begun) * 1e3)
    print(f"links {count}")


main(sys.argv[1], sys.argv[2], sys.argv[3])
