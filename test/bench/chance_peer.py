"""Mann-Kendall's S of many stations under the same random orders of their years, as one would script it with numpy, for
chance.bench.ts to compare with: the signs of all pairs of years, order by order; and, for who knows that S is a product of
two matrices of signs, that product.

Usage: chance_peer.py FILE ORDERS     FILE: JSON, a list of values for each station
Prints JSON: seconds of processor time of either way, and how many stations fall in the first orders, to be compared.
"""
import json
import sys
import time

import numpy as np

with open(sys.argv[1]) as file:
    X = np.array(json.load(file))
ORDERS = int(sys.argv[2])
stations, years = X.shape
i, j = np.triu_indices(years, 1)
rng = np.random.default_rng(7)
orders = [rng.permutation(years) for _ in range(ORDERS)]

begun = time.process_time()
by_signs = np.array([np.sign(X[:, order[j]] - X[:, order[i]]).sum(axis=1) for order in orders])
signs_seconds = time.process_time() - begun

begun = time.process_time()
larger = np.sign(X[:, j] - X[:, i]).astype(np.float32)
places = np.argsort(np.array(orders), axis=1)
comes_later = np.sign(places[:, j] - places[:, i]).astype(np.float32)
by_product = (larger @ comes_later.T).T
product_seconds = time.process_time() - begun

assert np.array_equal(by_signs, by_product)
print(json.dumps({"signs": signs_seconds, "product": product_seconds, "numpy": np.__version__}))
