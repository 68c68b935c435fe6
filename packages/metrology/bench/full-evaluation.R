# The same evaluation in base R, vectorised over the characteristics: columns are characteristics, rows readings.
# Arguments: file of doubles, characteristics, readings, rounds. Prints the median milliseconds and a line of check sums.
arguments <- commandArgs(trailingOnly = TRUE)
columns <- as.integer(arguments[2])
rows <- as.integer(arguments[3])
rounds <- as.integer(arguments[4])
x <- matrix(readBin(arguments[1], "double", columns * rows), nrow = rows)
lower <- 24.98
upper <- 25.02

evaluate <- function(x) {
  n <- nrow(x)
  m <- colMeans(x)
  d <- x - rep(m, each = n)
  s <- sqrt(colSums(d * d) / (n - 1))
  low <- vapply(seq_len(ncol(x)), function(j) min(x[, j]), 0)
  high <- vapply(seq_len(ncol(x)), function(j) max(x[, j]), 0)
  steps <- x[-1, ] - x[-n, ]
  mr <- abs(steps)
  mean_range <- colMeans(mr)
  sigma <- mean_range * sqrt(pi) / 2
  beyond_range <- colSums(mr > rep((1 + 3 * sqrt(2 - 4 / pi) / (2 / sqrt(pi))) * mean_range, each = n - 1))
  z <- d / rep(sigma, each = n)
  side <- sign(z)
  direction <- rbind(0, sign(steps))
  # Running sums over the last `length` rows from one cumulative sum over all columns.
  window <- function(flag, length) {
    total <- cumsum(flag)
    dim(total) <- dim(flag)
    before <- c(0L, total[n, -ncol(total)])
    total - rbind(matrix(rep(before, each = length), nrow = length), total[seq_len(n - length), ])
  }
  run <- function(flag, length) {
    total <- window(flag, length)
    total[seq_len(length - 1), ] <- 0
    total == length
  }
  up <- side > 0
  down <- side < 0
  rule <- integer(8)
  rule[1] <- sum(abs(z) > 3)
  rule[2] <- sum(run(up, 9)) + sum(run(down, 9))
  rising <- direction > 0
  falling <- direction < 0
  rule[3] <- sum(run(rising, 5)) + sum(run(falling, 5))
  turn <- rbind(FALSE, direction[-1, ] * direction[-n, ] < 0)
  rule[4] <- sum(run(turn, 12))
  high2 <- z > 2
  low2 <- z < -2
  rule[5] <- sum(high2 & window(high2, 3) >= 2) + sum(low2 & window(low2, 3) >= 2)
  high1 <- z > 1
  low1 <- z < -1
  rule[6] <- sum(high1 & window(high1, 5) >= 4) + sum(low1 & window(low1, 5) >= 4)
  rule[7] <- sum(run(abs(z) < 1, 15))
  outside <- run(abs(z) > 1, 8)
  above <- window(up, 8)
  rule[8] <- sum(outside & above > 0 & above < 8)
  room <- pmin(upper - m, m - lower)
  list(
    rule = rule, cpk = sum(room / (3 * sigma)), ppk = sum(room / (3 * s)),
    cp = sum((upper - lower) / (6 * sigma)), pp = sum((upper - lower) / (6 * s)),
    ends = sum(high - low), beyond = sum(beyond_range)
  )
}

invisible(evaluate(x))
times <- numeric(rounds)
for (round in seq_len(rounds)) times[round] <- system.time(found <- evaluate(x))[["elapsed"]] * 1000
cat(sprintf("%.3f\n", median(times)))
cat(found$rule, "\n")
cat(sprintf("%.9f %.9f %.9f %.9f %d\n", found$cpk, found$ppk, found$cp, found$ends, as.integer(found$beyond)))
