# Changes of pbc-visits.csv compared between arms, and within each; base R 4.2.2: Rscript arms.R > pbc-arms-expected.csv
# Changes are rounded to 10 decimals before ranking, so that ties of decimals survive the subtraction of logarithms.
d <- read.csv("pbc-visits.csv")
out <- NULL
add <- function(endpoint, contrast, stratum, method, n, estimate, error, low, high, statistic, df, p)
  out <<- rbind(out, data.frame(endpoint, contrast, stratum, method, n, estimate, error, low, high, statistic, df, p))
for (endpoint in c("bilirubin", "albumin", "platelets", "protime")) for (visit in c("month6", "year1", "year2")) {
  before <- d[d$visit == "baseline", c("patient", "arm", endpoint)]
  after <- d[d$visit == visit, c("patient", endpoint)]
  w <- merge(before, after, by = "patient")
  names(w) <- c("patient", "arm", "b", "f")
  w$b <- log(w$b); w$f <- log(w$f)
  w <- w[complete.cases(w), ]
  w$change <- w$f - w$b
  w$index <- as.numeric(w$arm == "penicillamine")
  x <- w$change[w$index == 1]; y <- w$change[w$index == 0]
  change <- paste0(visit, "-baseline"); between <- paste0(change, ":penicillamine-placebo")
  a <- lm(f ~ b + index, w); s <- coef(summary(a))["index", ]; ci <- confint(a)["index", ]
  add(endpoint, between, "", "change-ancova", nrow(w), s[1], s[2], ci[1], ci[2], s[3], a$df.residual, s[4])
  t <- t.test(x, y)
  add(endpoint, between, "", "change-welch", nrow(w), mean(x) - mean(y), t$stderr, t$conf.int[1], t$conf.int[2], t$statistic, t$parameter, t$p.value)
  r <- wilcox.test(round(x, 10), round(y, 10), exact = FALSE, correct = TRUE)
  add(endpoint, between, "", "change-rank-sum", nrow(w), median(outer(x, y, "-")), NA, NA, NA, r$statistic, NA, r$p.value)
  for (arm in c("penicillamine", "placebo")) {
    p <- w[w$arm == arm, ]
    t <- t.test(p$f, p$b, paired = TRUE)
    add(endpoint, change, arm, "paired-t", nrow(p), t$estimate, t$stderr, t$conf.int[1], t$conf.int[2], t$statistic, t$parameter, t$p.value)
  }
}
options(digits = 15)
write.csv(format(out, digits = 15), stdout(), row.names = FALSE, quote = FALSE)
