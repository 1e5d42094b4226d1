# Signed-rank test of year1 against baseline on differences whose decimal ties are restored by rounding to 11 significant
# digits, zeros dropped: exact where no two differences tie, else normal with tie and continuity correction. Run with base R: Rscript signed-rank-decimal.R > pbc-year1-signed-rank-decimal-expected.csv
d <- read.csv("pbc-visits.csv")
logged <- c("bilirubin", "cholesterol", "alk_phos", "ast", "platelets", "protime")
pairs <- merge(d[d$visit == "baseline", ], d[d$visit == "year1", ], by = "patient", suffixes = c(".0", ".1"))
cat("endpoint,V,p\n")
for (e in c(logged[1:2], "albumin", logged[3:6])) {
  x <- pairs[[paste0(e, ".1")]]
  y <- pairs[[paste0(e, ".0")]]
  if (e %in% logged) { x <- log(x); y <- log(y) }
  difference <- signif((x - y)[!is.na(x) & !is.na(y)], 11)
  difference <- difference[difference != 0]
  w <- suppressWarnings(wilcox.test(difference, exact = !anyDuplicated(abs(difference)), correct = TRUE))
  cat(sprintf("%s,%.17g,%.17g\n", e, w$statistic, w$p.value))
}
