# Recomputes the registered figures of a study from its tables, and compares them with the recorded result.
# Base R, no packages, nothing of Fairlead:  Rscript recompute.R
# Ends with status 1 when a figure differs. Run it in the folder into which the bundle was unpacked.

read <- function(name) read.csv(name, colClasses = "character", na.strings = character(0), check.names = FALSE,
                                encoding = "UTF-8")
trials <- read("trials.csv"); answers <- read("answers.csv"); recorded <- read("result.csv")
value <- function(path) { at <- match(path, recorded$path); if (is.na(at)) NA else recorded$value[at] }
number <- function(path) { text <- value(path); if (is.na(text) || text == "") NA else as.numeric(text) }

# Check trials are no part of the registered figures.
if ("kind" %in% names(trials)) { trials <- trials[trials$kind == "main", ]; answers <- answers[answers$kind == "main", ] }

failures <- 0
compare <- function(path, computed, tolerance = 0) {
  said <- number(path)
  if (is.na(said) && is.na(computed)) return(invisible())
  agrees <- !is.na(said) && !is.na(computed) && (said == computed || abs(said - computed) <= tolerance * max(1e-300, abs(said)))
  if (!agrees) failures <<- failures + 1
  cat(sprintf("%-6s %-44s recomputed %-20.12g recorded %.12g\n", if (agrees) "agrees" else "DIFFERS", path, computed, said))
}
near <- 1e-9

counted <- trials[trials$outcome == "counted", ]
key <- function(table) paste(table$session, table$trial)
answers <- answers[order(as.integer(answers$session), as.integer(answers$trial), answers$listener), ]
drawn <- setNames(counted$drawn, key(counted))[key(answers)]
right <- setNames(counted$right_answer, key(counted))[key(answers)]
given <- answers$answer
missing <- given == ""
if (anyNA(drawn)) { cat("DIFFERS an answer belongs to no counted trial\n"); failures <- failures + 1 }
alpha <- as.numeric(value("alpha")); method <- value("method")
listeners <- sort(unique(answers$listener))
own_draws <- all(table(key(answers)) <= 1)
clip <- function(x) max(0, min(1, x))

compare("trials", nrow(counted))
compare("answers", nrow(answers))
compare("missing", sum(missing))
compare("listeners", length(listeners))

# The distribution of a sum of independent trials, each of which gives one of its counts with equal chance.
convolve_trials <- function(counts) {
  ways <- 1
  for (k in counts) {
    longer <- numeric(length(ways) + max(k))
    for (one in k) { at <- seq_along(ways) + one; longer[at] <- longer[at] + ways / length(k) }
    ways <- longer
  }
  ways
}
by_trial <- split(seq_along(given), factor(key(answers), levels = unique(key(answers))))

# Student's t over trials, for answers to shared presentations (Cochran, Sampling Techniques, 3rd ed., 3.12).
over_trials <- function(counts, confidence) {
  n <- length(by_trial); all <- length(counts); rate <- mean(counts)
  residual <- sapply(by_trial, function(rows) sum(counts[rows] - rate))
  se <- sqrt(n / (n - 1) * sum(residual^2)) / all
  if (n < 2 || se == 0) return(c(NA, NA))
  rate + c(-1, 1) * qt(1 - (1 - confidence) / 2, n - 1) * se
}

each <- function(name, fn) for (i in seq_along(listeners)) {
  rows <- answers$listener == listeners[i]
  compare(sprintf("byListener/%d/%s", i - 1, name), fn(rows), near)
}
holm <- function(p) for (i in seq_along(p)) compare(sprintf("byListener/%d/holmP", i - 1), p.adjust(p, "holm")[i], near)

if (method %in% c("abx", "triangle", "duo-trio", "directional-comparison")) {
  m <- as.integer(value("chance/denominator")); g <- 1 / m
  labels <- unique(c(right, given[!missing]))
  while (length(labels) < m) labels <- c(labels, paste("label", length(labels) + 1))
  hit <- given == right & !missing
  k <- sum(hit); n <- length(hit)
  compare("correct", k)
  counts <- lapply(by_trial, function(rows) sapply(labels, function(label) sum(given[rows] == label)))
  ways <- convolve_trials(counts)
  p <- if (own_draws) { if (n == 0) 1 else pbinom(k - 1, n, g, lower.tail = FALSE) } else sum(ways[seq_along(ways) > k])
  compare("p/value", p, near)
  if ((p <= alpha) != (value("isSignificant") == "true") && abs(p / alpha - 1) > near) {
    cat("DIFFERS isSignificant\n"); failures <- failures + 1
  }
  if (own_draws) compare("lowerTail", pbinom(k, n - sum(missing), g), near)
  each("correct", function(rows) sum(hit[rows]))
  each("p", function(rows) pbinom(sum(hit[rows]) - 1, sum(rows), g, lower.tail = FALSE))
  holm(sapply(listeners, function(l) { rows <- answers$listener == l
    pbinom(sum(hit[rows]) - 1, sum(rows), g, lower.tail = FALSE) }))
  if (n > 0 && !is.na(value("estimates/correctRate"))) {
    compare("estimates/correctRate", k / n, near)
    fit <- as.numeric(hit); loose <- as.numeric(hit | missing)
    limits <- if (own_draws) c(binom.test(k, n)$conf.int[1], binom.test(sum(loose), n)$conf.int[2]) else
      c(clip(over_trials(fit, .95)[1]), clip(over_trials(loose, .95)[2]))
    compare("estimates/interval/lower", limits[1], near)
    compare("estimates/interval/upper", limits[2], near)
    above <- function(rate) max(0, (rate - g) / (1 - g))
    compare("estimates/aboveGuessing/rate", above(k / n), near)
    lower <- if (own_draws) binom.test(k, n, alternative = "greater", conf.level = 1 - alpha)$conf.int[1] else
      clip(over_trials(fit, 1 - 2 * alpha)[1])
    upper <- if (own_draws) binom.test(sum(loose), n, alternative = "less")$conf.int[2] else clip(over_trials(loose, .9)[2])
    compare("estimates/aboveGuessing/oneSidedLower/limit", above(lower), near)
    compare("estimates/aboveGuessing/oneSidedUpper/limit", above(upper), near)
    if (!is.na(value("margin/share"))) {
      below <- above(upper) < number("margin/share")
      if (below != (value("margin/isBelow") == "true")) { cat("DIFFERS margin/isBelow\n"); failures <- failures + 1 }
      else cat(sprintf("agrees margin/isBelow: %s\n", value("margin/isBelow")))
    }
  }
}

if (method == "paired-preference") {
  decided <- given %in% c("first", "second")
  for_first <- decided & given == drawn
  k <- sum(for_first); n <- sum(decided)
  compare("decided", n); compare("preferred/0", k); compare("preferred/1", n - k)
  compare("undecided", sum(given == "none"))
  counts <- lapply(by_trial, function(rows) c(sum(given[rows] == "first"), sum(given[rows] == "second")))
  ways <- convolve_trials(counts); at <- seq_along(ways) - 1; centre <- sum(at * ways)
  compare("p/value", min(1, sum(ways[abs(at - centre) >= abs(k - centre) - 1e-9])), near)
  p_of <- function(rows) { of <- sum(decided[rows]); if (of == 0) 1 else binom.test(sum(for_first[rows]), of)$p.value }
  each("p", p_of)
  holm(sapply(listeners, function(l) p_of(answers$listener == l)))
  votes <- sapply(listeners, function(l) { rows <- answers$listener == l & decided; sign(2 * sum(for_first[rows]) - sum(rows)) })
  compare("majorities/preferred/0", sum(votes > 0)); compare("majorities/preferred/1", sum(votes < 0))
  sides <- c(sum(votes > 0), sum(votes < 0))
  compare("majorities/p", if (sum(sides) == 0) 1 else binom.test(sides[1], sum(sides))$p.value, near)
  if (!is.na(value("estimates/share")) && n > 0) {
    compare("estimates/share", k / n, near)
    if (own_draws) { limits <- binom.test(k, n, conf.level = 1 - alpha)$conf.int
      compare("estimates/interval/lower", limits[1], near); compare("estimates/interval/upper", limits[2], near) }
  }
}

if (method == "same-different") {
  is_different <- substr(counted$drawn, 1, 1) != substr(counted$drawn, 2, 2)
  names(is_different) <- key(counted)
  of_answer <- is_different[key(answers)]
  said <- given == "different"
  compare("differentTrials", sum(is_different))
  compare("onDifferent/different", sum(said & of_answer)); compare("onSame/different", sum(said & !of_answer))
  # A missing answer counts as wrong: as "same" on a different trial, as "different" on a same one.
  read_as <- said | (missing & !of_answer)
  p_of <- function(rows) {
    keys <- unique(key(answers)[rows])
    d <- is_different[keys]; c_t <- sapply(keys, function(k) sum(read_as[rows & key(answers) == k]))
    if (all(d) || !any(d)) return(1)
    # Ways to choose as many trials as different ones with so many "different" answers on them.
    ways <- matrix(0, sum(d) + 1, sum(c_t) + 1); ways[1, 1] <- 1
    for (x in c_t) for (taken in sum(d):1) {
      from <- ways[taken, ]; to <- seq_len(ncol(ways) - x)
      ways[taken + 1, to + x] <- ways[taken + 1, to + x] + from[to]
    }
    last <- ways[sum(d) + 1, ]
    sum(last[seq_along(last) - 1 >= sum(c_t[d])]) / sum(last)
  }
  compare("p/value", p_of(rep(TRUE, length(given))), near)
  each("p", p_of)
  holm(sapply(listeners, function(l) p_of(answers$listener == l)))
}

cat(if (failures == 0) "\nEvery figure agrees with the recorded result.\n" else sprintf("\n%d figures differ.\n", failures))
quit(status = if (failures == 0) 0 else 1)
