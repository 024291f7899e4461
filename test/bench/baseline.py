"""The yardstick of the benchmark: only averages, fits, clusters and tests; no order, no checks, no report.

usage: baseline.py shells.csv folder

Reads a table of shells (section, bed, taxon, shell, level, A/I), averages the log ratios into beds, fits normal mixtures of 1 to
8 components by BIC, does k-means with silhouettes for 2 to 8 groups, tests neighbouring groups, and writes three tables.
"""

import sys
from pathlib import Path

import numpy as np
import pandas as pd
from scipy import stats
from sklearn.cluster import KMeans
from sklearn.metrics import silhouette_score
from sklearn.mixture import GaussianMixture

table, folder = sys.argv[1], Path(sys.argv[2])
folder.mkdir(parents=True, exist_ok=True)
shells = pd.read_csv(table)
shells["x"] = np.log(shells["A/I"])
beds = shells.groupby(["section", "bed"], sort=False)["x"].agg(["mean", "std", "count"]).reset_index()
means = beds["mean"].to_numpy().reshape(-1, 1)

fits = [GaussianMixture(k, covariance_type="tied", n_init=2, random_state=1).fit(means) for k in range(1, 9)]
scores = [fit.bic(means) for fit in fits]
best = fits[int(np.argmin(scores))]
rank = np.argsort(np.argsort(best.means_[:, 0]))
beds["zone"] = rank[best.predict(means)]

counts = []
for k in range(2, 9):
    labels = KMeans(k, n_init=10, random_state=1).fit_predict(means)
    counts.append({"k": k, "bic": scores[k - 1], "silhouette": silhouette_score(means, labels)})

shells = shells.merge(beds[["section", "bed", "zone"]], on=["section", "bed"])
tests = []
for zone in range(beds["zone"].max()):
    young = shells.loc[shells["zone"] == zone, "x"]
    old = shells.loc[shells["zone"] == zone + 1, "x"]
    u = stats.mannwhitneyu(old, young)
    t = stats.ttest_ind(beds.loc[beds["zone"] == zone + 1, "mean"], beds.loc[beds["zone"] == zone, "mean"], equal_var=False)
    tests.append({"younger": zone, "older": zone + 1, "u": u.statistic, "p_u": u.pvalue, "p_t": t.pvalue})

beds.to_csv(folder / "beds.csv", index=False)
pd.DataFrame(counts).to_csv(folder / "zone_counts.csv", index=False)
pd.DataFrame(tests).to_csv(folder / "adjacent_zones.csv", index=False)
