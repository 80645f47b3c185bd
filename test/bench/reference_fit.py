"""The same choice of penalty by scikit-learn: 10 contiguous folds, columns standardised inside each fold, then the final fit.

    python3 reference_fit.py data.bin records inputs ridge|lasso lambdas.json wanted.json threads

Ridge: a Pipeline of StandardScaler and Ridge for every penalty and fold (what GridSearchCV and RidgeCV(cv=...) do; alpha is
records * lambda). Only the penalties at the positions in wanted.json are run, and the time is scaled to all of them: the cost of
a fit does not depend on its penalty. Lasso: lasso_path with warm starts for every fold (what LassoCV does), all penalties.
Prints JSON: seconds, cvError at the positions run, weights of the final fit at the chosen position.
"""
import json
import sys
import time
import warnings

import numpy as np
from joblib import Parallel, delayed
from sklearn.linear_model import Lasso, Ridge, lasso_path
from sklearn.pipeline import make_pipeline
from sklearn.preprocessing import StandardScaler

warnings.filterwarnings("ignore")
path, n, p, method, lambdas_path, wanted_path, threads = sys.argv[1:]
n, p, threads = int(n), int(p), int(threads)
data = np.fromfile(path).reshape(p + 1, n)
X, y = data[:p].T, data[p]
lambdas = np.array(json.load(open(lambdas_path)))
wanted = json.load(open(wanted_path))
block = n // 10


def split(fold):
    test = np.arange(fold * block, (fold + 1) * block)
    return np.setdiff1d(np.arange(n), test), test


def ridge_fold(fold):
    train, test = split(fold)
    Xf, yf, Xt, yt = X[train], y[train], X[test], y[test]
    start = time.perf_counter()
    errors = []
    for at in wanted["run"]:
        model = make_pipeline(StandardScaler(), Ridge(alpha=len(train) * lambdas[at])).fit(Xf, yf)
        errors.append(np.mean((yt - model.predict(Xt)) ** 2))
    return errors, time.perf_counter() - start


def lasso_fold(fold):
    train, test = split(fold)
    scaler = StandardScaler().fit(X[train])
    Xf, yf = np.asfortranarray(scaler.transform(X[train])), y[train]
    mean = yf.mean()
    _, weights, _ = lasso_path(Xf, yf - mean, alphas=lambdas, tol=1e-6, max_iter=20000, precompute="auto" if len(train) > p else False)
    residuals = y[test][:, None] - mean - scaler.transform(X[test]) @ weights
    return (residuals ** 2).mean(0).tolist(), 0.0


start = time.perf_counter()
answers = Parallel(n_jobs=threads, prefer="threads" if method == "ridge" else "processes")(
    delayed(ridge_fold if method == "ridge" else lasso_fold)(fold) for fold in range(10)
)
seconds = time.perf_counter() - start
if method == "ridge":
    seconds *= len(lambdas) / len(wanted["run"])
errors = np.mean([errors for errors, _ in answers], axis=0)
start = time.perf_counter()
scaler = StandardScaler().fit(X)
Z = np.asfortranarray(scaler.transform(X))
lam = lambdas[wanted["chosen"]]
model = Ridge(alpha=n * lam) if method == "ridge" else Lasso(alpha=lam, tol=1e-9, max_iter=100000)
model.fit(Z, y)
seconds += time.perf_counter() - start
print(json.dumps({"seconds": seconds, "cvError": errors.tolist(), "weights": model.coef_.tolist()}))
