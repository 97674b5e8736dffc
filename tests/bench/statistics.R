# The same work as tests/bench/statistics.ts, in R: prints seconds per run of each piece, one a line.
# Arguments: the number of listeners and of trials each; right answers are those of the formula in the other file.

seconds <- function(name, work) {
  once <- system.time(work())[["elapsed"]]
  times <- max(1, ceiling(0.5 / max(once, 1e-6)))
  times <- min(times, 20000)
  cat(name, "\t", system.time(for (i in seq_len(times)) work())[["elapsed"]] / times, "\n", sep = "")
}

right <- function(listeners, trials) floor(trials * (0.5 + ((seq_len(listeners) - 1) * 7919) %% 97 / 400))

report <- function(listeners, trials) {
  x <- right(listeners, trials)
  p <- pbinom(x - 1, trials, 0.5, lower.tail = FALSE)
  lower <- qbeta(0.025, x, trials - x + 1)
  upper <- qbeta(0.975, x + 1, trials - x)
  holm <- p.adjust(p, "holm")
  rate <- sum(x) / (listeners * trials)
  among <- sum((x - trials * rate)^2 / (trials * rate * (1 - rate)))
  z <- (sum((x - trials * rate)^2) / (rate * (1 - rate)) - listeners * trials) / sqrt(2 * listeners * trials * (trials - 1))
  residual <- x - trials * rate
  se <- sqrt(listeners / (listeners - 1) * sum(residual^2)) / (listeners * trials)
  list(p, lower, upper, holm, pchisq(among, listeners - 1, lower.tail = FALSE), pnorm(z, lower.tail = FALSE),
    rate + c(-1, 1) * qt(0.975, listeners - 1) * se)
}

# The draws of 100 trials that 100 listeners heard, trial by trial, in doubles.
shared <- function() {
  ways <- 1
  for (t in 0:99) {
    counts <- c((t * 37) %% 101, 100 - (t * 37) %% 101)
    longer <- numeric(length(ways) + max(counts))
    for (count in counts) {
      places <- seq_along(ways) + count
      longer[places] <- longer[places] + ways / 2
    }
    ways <- longer
  }
  sum(ways[5051:length(ways)])
}

# By the method of the check values: mean and correlation on unbounded scales, Nelder and Mead.
beta_binomial <- function() {
  x <- right(100, 100)
  less <- function(theta) {
    mu <- plogis(theta[1]); rho <- plogis(theta[2])
    a <- mu * (1 - rho) / rho; b <- (1 - mu) * (1 - rho) / rho
    -sum(lchoose(100, x) + lbeta(x + a, 100 - x + b) - lbeta(a, b))
  }
  optim(c(0, -3), less, control = list(reltol = 1e-12))
}

table <- matrix(c(30, 22, 20, 28), 2)
seconds("report 100", function() report(100, 100))
seconds("report 10000", function() report(100, 10000))
seconds("shared", shared)
seconds("beta-binomial", beta_binomial)
seconds("one-sided", function() pbinom(59, 100, 0.5, lower.tail = FALSE))
seconds("one-sided test", function() binom.test(60, 100, alternative = "greater")$p.value)
seconds("two-sided", function() binom.test(682, 925, 0.75)$p.value)
seconds("limits", function() c(qbeta(0.025, 60, 41), qbeta(0.975, 61, 40)))
seconds("trials", function() {
  smallest <- function(n) qbinom(0.05, n, 0.5, lower.tail = FALSE) + 1
  has <- vapply(1:300, function(n) pbinom(smallest(n) - 1, n, 0.7, lower.tail = FALSE) >= 0.9, logical(1))
  max(which(!has)) + 1
})
seconds("fisher", function() fisher.test(table)$p.value)
seconds("chi-square", function() pchisq(21.18, 9, lower.tail = FALSE))
