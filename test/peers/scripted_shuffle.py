"""Peer: Moran's I of shuffled maps with scipy's sparse matrices, sixteen permutations at a time.

Usage: scripted_shuffle.py JOB PERMUTATIONS (the job of native_shuffle); prints milliseconds.
"""
import sys
import time

import numpy as np
import scipy.sparse


def main(path, permutations):
    with open(path, "rb") as file:
        n, pairs, _, _, _ = np.fromfile(file, np.uint32, 5)
        values = np.fromfile(file, np.float32, n).astype(float)
        offsets = np.fromfile(file, np.uint32, n + 1)
        indices = np.fromfile(file, np.uint32, pairs)
        weights = np.fromfile(file, np.float32, pairs).astype(float)
    upper = scipy.sparse.csr_matrix((weights / 2, indices.astype(np.int32), offsets.astype(np.int32)), (n, n))
    matrix = (upper + upper.T).tocsr()
    generator = np.random.default_rng(1)
    begun = time.perf_counter()
    for _ in range(0, permutations, 16):
        shuffled = np.empty((n, 16))
        for column in range(16):
            shuffled[:, column] = generator.permutation(values)
        np.einsum("ij,ij->j", shuffled, matrix @ shuffled)
    print((time.perf_counter() - begun) * 1e3)


main(sys.argv[1], int(sys.argv[2]))
