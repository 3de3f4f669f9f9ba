#include "web/model/worked_case.h"

namespace rejoinder {

// clang-format off
const char* worked_case() {
  return R"huts(rejoinder = 1
title = "What fills a mountain hut? Table 3"
note = "An invented paper: 236 huts, nights booked per bed in one summer. Ascent in hundreds of metres, walking time in hours, price in tens of francs; cable car, shower and vegetarian menu are 0 or 1. Column (4): whether the hut was full on the first Saturday of August."
level = 0.05
stars = ["0.10", "0.05", "0.01"]

[[column]]
id = "1"
label = "(1)"
outcome = "nights per bed"
errors = "classical"
n = 236
k = 3
r2 = "0.249"
adj_r2 = "0.239"

  [[column.term]]
  name = "ascent"
  coef = "−1.290***"
  se = "0.402"

  [[column.term]]
  name = "walking time"
  coef = "−1.652**"
  se = "0.731"

  [[column.term]]
  name = "price"
  coef = "−0.966"
  se = "0.678"

[[column]]
id = "2"
label = "(2)"
outcome = "nights per bed"
errors = "classical"
n = 236
k = 6
r2 = "0.306"
adj_r2 = "0.288"

  [[column.term]]
  name = "ascent"
  coef = "−0.991**"
  se = "0.401"

  [[column.term]]
  name = "walking time"
  coef = "−1.721**"
  se = "0.713"

  [[column.term]]
  name = "price"
  coef = "−1.188*"
  se = "0.669"

  [[column.term]]
  name = "cable car"
  coef = "3.979***"
  se = "1.326"

  [[column.term]]
  name = "shower"
  coef = "2.932**"
  se = "1.292"

  [[column.term]]
  name = "vegetarian menu"
  coef = "1.373"
  se = "1.252"

  [column.covariance]
  terms = ["ascent", "walking time"]
  lower = [["0.1607"], ["−0.2280", "0.5085"]]

[[column]]
id = "3"
label = "(3) winter"
outcome = "nights per bed"
errors = "classical"
n = 148
k = 6
r2 = "0.239"
adj_r2 = "0.207"

  [[column.term]]
  name = "ascent"
  coef = "−0.721"
  se = "0.525"

  [[column.term]]
  name = "walking time"
  coef = "−1.807**"
  se = "0.911"

  [[column.term]]
  name = "price"
  coef = "−1.187"
  se = "0.819"

  [[column.term]]
  name = "cable car"
  coef = "3.077*"
  se = "1.730"

  [[column.term]]
  name = "shower"
  coef = "1.060"
  se = "1.637"

  [[column.term]]
  name = "vegetarian menu"
  coef = "0.978"
  se = "1.629"

[[column]]
id = "4"
label = "(4) logit"
outcome = "full in August"
estimator = "ml"
errors = "classical"
n = 236
k = 6
loglik = "−122.65"

  [[column.term]]
  name = "ascent"
  coef = "−0.473***"
  se = "0.117"

  [[column.term]]
  name = "walking time"
  coef = "−0.083"
  se = "0.187"

  [[column.term]]
  name = "price"
  coef = "−0.223"
  se = "0.176"

  [[column.term]]
  name = "cable car"
  coef = "0.174"
  se = "0.343"

  [[column.term]]
  name = "shower"
  coef = "0.898***"
  se = "0.343"

  [[column.term]]
  name = "vegetarian menu"
  coef = "0.588*"
  se = "0.331"

[[claim]]
id = "comfort"
says = "Cable car, shower and vegetarian menu jointly improve the fit, F(3, 229) = 6.31, p < .001."
column = "2"
restrictions = "\"cable car\" = 0, shower = 0, \"vegetarian menu\" = 0"
restricted = "1"
f = "6.31"
p = "<.001"
df = [3, 229]
page = "p. 11"

[[claim]]
id = "remoteness"
says = "Remoteness as a whole deters guests (F(2, 229) = 58.96, p < .001)."
column = "2"
restrictions = "ascent = 0, \"walking time\" = 0"
f = "58.96"
p = "<.001"
df = [2, 229]
page = "p. 11"

[[claim]]
id = "half-hour"
says = "A hundred metres of ascent keep away as many guests as half an hour of walking (F(1, 229) = 0.03, p = .86)."
column = "2"
restrictions = "ascent = 0.5 \"walking time\""
f = "0.03"
p = ".86"
df = [1, 229]
rejects = false
page = "p. 12"

[[claim]]
id = "price-and-menu"
says = "Neither the price nor the menu is significant at the 5 % level, so neither plays a part."
column = "2"
restrictions = "price = 0, \"vegetarian menu\" = 0"
rejects = false
page = "p. 12"

[[claim]]
id = "cable-car-and-price"
says = "A cable car and the price of a night matter jointly (p < .05)."
column = "2"
restrictions = "\"cable car\" = 0, price = 0"
p = "<.05"
rejects = true
page = "p. 13"

[[claim]]
id = "car-beats-menu"
says = "A cable car is significant and a vegetarian menu is not: the cable car adds significantly more."
column = "2"
restrictions = "\"cable car\" = \"vegetarian menu\""
rejects = true
page = "p. 13"

[[claim]]
id = "full-house"
says = "For full houses in August, shower and menu add nothing (likelihood ratio test, chi-square(2) = 4.91, p = .086)."
column = "4"
restrictions = "shower = 0, \"vegetarian menu\" = 0"
restricted_fit = { loglik = "−127.56", k = 4 }
chi2 = "4.91"
p = ".086"
df = [2]
rejects = false
page = "p. 15"

[[claim]]
id = "winter"
says = "Among huts open in winter comfort improves the fit of column (1) too (F(3, 141) = 3.10)."
column = "3"
restricted = "1"
f = "3.10"
df = [3, 141]
page = "p. 16"

[[claim]]
id = "whole"
says = "The regression as a whole is significant (F(6, 235) = 16.83, p < .001)."
column = "2"
restrictions = "all"
f = "16.83"
p = "<.001"
df = [6, 235]
page = "Table 3, note"

[[claim]]
id = "regions"
says = "Five dummies for the region, not shown, add nothing (F(5, 224) = 1.37, p = .236)."
f = "1.37"
p = ".236"
df = [5, 224]
rejects = false
page = "p. 17, note 9"
)huts";
}
// clang-format on

}  // namespace rejoinder
