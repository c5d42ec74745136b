# Time nlme (Lindstrom-Bates) on a pool file: the same model with c0 held at 0.02, the only way it works.
# Rscript nlmePool.R POOL.csv: prints the processor seconds of the fit, or FAILED.
suppressMessages(library(nlme))
d <- read.csv(commandArgs(TRUE)[1], stringsAsFactors = FALSE)
iw <- 0.012 / d$rel_sd
d <- data.frame(
  bank = factor(d$bank), model = factor(d$model), iw = iw, y0 = (log(d$capacity_ah / d$rated_ah) - 0.02) * iw,
  ht = 0.5 * log(d$years), ln = log(pmax(d$efc, 1) / 500), tau = (1 / 298.15 - 1 / (d$temp_c + 273.15)) / 8.314e-3,
  S = d$soc_mean - 0.5, lD = log(d$depth / 0.5), lC = log(d$c_rate / 0.2), K = d$clamped
)
# Response and model divided by sqrt(w), with analytic derivatives.
curve80 <- function(c0, lnA, aT, aS, lnB, z, bD, bC, bT, bK, u, ht, ln, tau, S, lD, lC, K, iw) {
  eA <- exp(u + lnA + aT * tau + aS * S + ht)
  eB <- exp(u + lnB + z * ln + bD * lD + bC * lC + bT * tau + bK * K)
  q <- eA + eB
  cut <- pmin(q, 0.9)
  g <- -1 / (1 - cut)
  v <- (c0 + log(1 - cut) - (q - cut) / 0.1) * iw
  G <- cbind(
    c0 = 1, lnA = g * eA, aT = g * eA * tau, aS = g * eA * S, lnB = g * eB, z = g * eB * ln, bD = g * eB * lD,
    bC = g * eB * lC, bT = g * eB * tau, bK = g * eB * K, u = g * q
  )
  attr(v, "gradient") <- G * iw
  v
}
start <- c(lnA = log(0.03), aT = 25, aS = 0.8, lnB = log(0.025), z = 0.55, bD = 0.4, bC = 0.2, bT = 20, bK = 0)
time <- system.time(fit <- try(nlme(
  y0 ~ curve80(c0, lnA, aT, aS, lnB, z, bD, bC, bT, bK, u, ht, ln, tau, S, lD, lC, K, iw),
  data = d, fixed = lnA + aT + aS + lnB + z + bD + bC + bT + bK ~ 1,
  random = list(model = pdDiag(u ~ 1), bank = pdDiag(c0 + u ~ 1)), start = start, method = "ML",
  control = nlmeControl(maxIter = 60, tolerance = 1e-5, msMaxIter = 200, returnObject = TRUE)
), silent = TRUE))
if (inherits(fit, "try-error")) cat("FAILED\n") else cat(time[1] + time[2], "\n")
