# Regression on within-pair differences of the small study's endpoint crp, by base R: Rscript adjusted.R > adjusted-expected.csv
d <- c(1.5, 2.1, 0.3, -0.4, 1.1, 0.9, 2.2, 0.7)
bmi <- c(24.1 - 23.0, 27.3 - 26.1, 22.2 - 22.9, 30.4 - 28.8, 25.0 - 24.2, 26.6 - 27.5, 23.8 - 21.9, 28.1 - 25.6)
hours <- c(10, 16, 8, 14, 4, 11, 5, 10)
adjusted <- summary(lm(d ~ bmi))$coefficients
welch <- t.test(d[5:8], d[1:4])
slope <- summary(lm(d ~ 0 + hours))$coefficients
# Limits of mean / sd: the noncentralities under which the observed t stands at 2.5 %, over the root of 8.
t <- t.test(d)$statistic
low <- uniroot(function(ncp) pt(t, 7, ncp, lower.tail = FALSE) - 0.025, c(-5, 10), tol = 1e-13)$root / sqrt(8)
high <- uniroot(function(ncp) pt(t, 7, ncp) - 0.025, c(-5, 20), tol = 1e-13)$root / sqrt(8)
cat("endpoint,intercept,intercept_t,welch_t,welch_p,slope,slope_t,effect_low,effect_high\n")
cat(sprintf(
  "crp,%.17g,%.17g,%.17g,%.17g,%.17g,%.17g,%.17g,%.17g\n", adjusted[1, 1], adjusted[1, 3], welch$statistic, welch$p.value,
  slope[1, 1], slope[1, 3], low, high))
