# All four visits of pbc-visits.csv at once, subjects seen at each; base R 4.2.2: Rscript visits.R > pbc-visits-expected.csv
# rm-anova: F of aov(value ~ visit + Error(patient)) and Greenhouse and Geisser's epsilon of mauchly.test's covariance;
# friedman: friedman.test; linear-trend: t.test of each subject's slope on 0, 1, 2, 3.
d <- read.csv("pbc-visits.csv")
visits <- c("baseline", "month6", "year1", "year2")
out <- NULL
for (endpoint in c("bilirubin", "albumin", "platelets", "protime")) {
  w <- sapply(visits, function(v) { x <- d[d$visit == v, ]; x[match(unique(d$patient), x$patient), endpoint] })
  if (endpoint != "albumin") w <- log(w)
  w <- w[complete.cases(w), ]
  n <- nrow(w); k <- ncol(w)
  m <- lm(w ~ 1)
  long <- data.frame(y = as.vector(w), visit = factor(rep(visits, each = n)), patient = factor(rep(1:n, k)))
  table <- anova(lm(y ~ patient + visit, long))
  f <- table["visit", "F value"]
  s <- cov(w %*% contr.helmert(k) %*% diag(1 / sqrt(colSums(contr.helmert(k)^2))))
  eps <- sum(diag(s))^2 / ((k - 1) * sum(s * s))
  mauchly <- mauchly.test(m, X = ~1)
  fr <- friedman.test(round(w, 10))
  slopes <- w %*% ((0:3) - 1.5) / 5
  t <- t.test(slopes)
  out <- rbind(out, data.frame(endpoint, n, f, eps, df1 = eps * (k - 1), df2 = eps * (n - 1) * (k - 1),
    p = pf(f, eps * (k - 1), eps * (n - 1) * (k - 1), lower.tail = FALSE), mauchly_w = mauchly$statistic, mauchly_p = mauchly$p.value,
    friedman = fr$statistic, friedman_p = fr$p.value, slope = t$estimate, slope_t = t$statistic, slope_p = t$p.value))
}
write.csv(format(out, digits = 15), stdout(), row.names = FALSE, quote = FALSE)
