#!/usr/bin/env python3
"""Writes reckoned.json: requests of every kind of asset under every kind of curve, with answers reckoned here.

This is the contract's formula worked out a second time, in 50 digits, by someone who has not read the core: nothing
is shared with it. Run it by hand after changing it (`tests/golden/reckoning.py`, needs python3-mpmath); the file it
writes is data like the rest of this folder.
"""

import json
import random
from datetime import date, timedelta
from pathlib import Path

from mpmath import diff, exp, findroot, floor, ceil, log, mp, mpf, sqrt

mp.dps = 50
AS_OF = date(2026, 12, 1)
SOURCE = "the contract's formula in 50 digits (tests/golden/reckoning.py)"
HOLIDAYS = [date(2026, 12, 25), date(2027, 3, 26), date(2027, 3, 29), date(2027, 12, 24)]


# ---- dates: weekends and the list above ------------------------------------------------------------------------


def is_good(day):
    return day.weekday() < 5 and day not in HOLIDAYS


def following(day):
    while not is_good(day):
        day += timedelta(1)
    return day


def settled(day, lag):
    for _ in range(lag):
        day = following(day + timedelta(1))
    return following(day)


def years(day):
    return mpf((day - AS_OF).days) / 365


# ---- rates and curves: ln P(u) -----------------------------------------------------------------------------------

TIMES = {"annual": 1, "semiannual": 2, "quarterly": 4, "monthly": 12}


def log_of_rate(rate, start, end):
    if not isinstance(rate, dict):
        rate = {"rate": rate}
    r = mpf(str(rate["rate"]))
    basis = 360 if rate.get("dayCount") == "ACT/360" else 365
    time = mpf((end - start).days) / basis
    compounding = rate.get("compounding", "continuous")
    if compounding == "continuous":
        return -r * time
    if compounding == "simple":
        return -log(1 + r * time)
    m = TIMES[compounding]
    return -m * time * log(1 + r / m)


def log_linear(points, t):
    """Through points of (time, ln P), the last slope held."""
    for (t0, y0), (t1, y1) in zip(points, points[1:]):
        if t <= t1:
            break
    return y0 + (y1 - y0) * (t - t0) / (t1 - t0)


def log_of_pillars(curve, u):
    times, logs = [mpf(0)], [mpf(0)]
    for pillar in curve["pillars"]:
        day = date.fromisoformat(pillar["at"])
        value = mpf(str(pillar["value"]))
        times.append(years(day))
        logs.append(log(value) if curve["quote"] == "factor" else log_of_rate({**curve, "rate": pillar["value"]}, AS_OF, day))
    if curve["interpolation"] == "log-linear":
        return log_linear(list(zip(times, logs)), years(u))
    zeros = [-y / t for t, y in zip(times[1:], logs[1:])]
    t = years(u)
    if t <= times[1]:
        return -zeros[0] * t
    if t >= times[-1]:
        return -zeros[-1] * t
    return -log_linear(list(zip(times[1:], zeros)), t) * t


def b_of(k, t):
    return (1 - exp(-k * t)) / k


def variance(k, s, t):
    return s**2 / k**2 * (t - 2 * b_of(k, t) + (1 - exp(-2 * k * t)) / (2 * k))


def log_cir(model, t, scale=mpf(1)):
    """ln E[e^(-scale * integral of r)]."""
    k, th, s, r0 = (mpf(str(model[name])) for name in ("meanReversion", "longRun", "volatility", "r0"))
    g = sqrt(k**2 + 2 * scale * s**2)
    d = (g + k) * (exp(g * t) - 1) + 2 * g
    return 2 * k * th / s**2 * log(2 * g * exp((k + g) * t / 2) / d) - scale * r0 * 2 * (exp(g * t) - 1) / d


def outcomes(model, u):
    """Every (probability, ln D) of the meetings up to u."""
    all_ = [(mpf(1), -mpf(str(model["overnight"])) * years(u))]
    for meeting in model["meetings"]:
        left = max(mpf(0), years(u) - years(date.fromisoformat(meeting["date"])))
        all_ = [
            (p * mpf(str(move["probability"])), x - mpf(str(move["by"])) * left) for p, x in all_ for move in meeting["moves"]
        ]
    return all_


def log_factor(curve, u):
    if not isinstance(curve, dict) or "rate" in curve:
        return log_of_rate(curve, AS_OF, u)
    if curve["kind"] == "pillars":
        return log_of_pillars(curve, u)
    if curve["kind"] == "instruments":
        return log_of_instruments(curve, u)
    model, t = curve["model"], years(u)
    if model in ("ho-lee", "hull-white"):
        return log_factor(curve["fit"], u)
    if model == "vasicek":
        mean, var = law(curve, u)
        return mean + var / 2
    if model == "cox-ingersoll-ross":
        return log_cir(curve, t)
    if model == "policy-meetings":
        return log(sum(p * exp(x) for p, x in outcomes(curve, u)))
    if model == "scenarios":
        return log(sum(mpf(str(s["weight"])) * exp(log_factor(s["curve"], u)) for s in curve["scenarios"]))
    return log_of_samples(curve, u)


def log_of_samples(curve, u):
    points = [(mpf(0), mpf(0))]
    for column, day in enumerate(curve["dates"]):
        mean = sum(mpf(str(row[column])) for row in curve["factors"]) / len(curve["factors"])
        points.append((years(date.fromisoformat(day)), log(mean)))
    return log_linear(points, years(u))


def law(curve, u):
    """Mean and variance of ln D(u), None where they are not looked at here."""
    model, t = curve["model"], years(u)
    if model == "vasicek":
        k, th, s, r0 = (mpf(str(curve[name])) for name in ("meanReversion", "longRun", "volatility", "r0"))
        return -th * t - (r0 - th) * b_of(k, t), variance(k, s, t)
    if model in ("ho-lee", "hull-white"):
        s = mpf(str(curve["volatility"]))
        var = s**2 * t**3 / 3 if model == "ho-lee" else variance(mpf(str(curve["meanReversion"])), s, t)
        return log_factor(curve, u) - var / 2, var
    if model == "cox-ingersoll-ross":
        return diff(lambda x: log_cir(curve, t, x), 0, 1), diff(lambda x: log_cir(curve, t, x), 0, 2)
    if model == "policy-meetings":
        all_ = outcomes(curve, u)
    elif model == "scenarios":
        all_ = [(mpf(str(s["weight"])), log_factor(s["curve"], u)) for s in curve["scenarios"]]
    else:
        return None
    mean = sum(p * x for p, x in all_)
    return mean, sum(p * (x - mean) ** 2 for p, x in all_)


# ---- curves from quotes: each pillar in its turn, by a root finder ------------------------------------------------


def through(interpolation, times, zeros, t):
    """ln P through zero rates at times, without the limits of a request's pillars."""
    if interpolation == "log-linear":
        return log_linear([(mpf(0), mpf(0)), *((x, -z * x) for x, z in zip(times, zeros))], t)
    if t <= times[0]:
        return -zeros[0] * t
    if t >= times[-1]:
        return -zeros[-1] * t
    return -log_linear(list(zip(times, zeros)), t) * t


def solved(interpolation, ends, misses):
    """ln P as a function, every miss in its turn brought to 0; a miss looks no further than its end."""
    times, zeros = [], []
    for end, miss in zip(ends, misses):
        times.append(years(end))
        zeros.append(findroot(lambda z: miss(lambda u: through(interpolation, times, [*zeros, z], years(u))), mpf("0.02")))
    return lambda u: through(interpolation, times, zeros, years(u))


def after(start, tenor):
    """Modified following; `start` is no month's last business day."""
    count, unit = int(tenor[:-1]), tenor[-1]
    if unit in "DW":
        return following(start + timedelta(count * (7 if unit == "W" else 1)))
    months = start.month - 1 + count * (12 if unit == "Y" else 1)
    day = date(start.year + months // 12, months % 12 + 1, start.day)
    if following(day).month == day.month:
        return following(day)
    while not is_good(day):
        day -= timedelta(1)
    return day


def fraction(item, start, end):
    return mpf((end - start).days) / (360 if item["dayCount"] == "ACT/360" else 365)


def miss_of(curve, item):
    spot = settled(AS_OF, curve["spotLag"])
    rate = mpf(str(item["rate"]))

    def taken(u):
        return sum(
            mpf(str(turn["spread"])) * max(mpf(0), min(years(u), years(date.fromisoformat(turn["to"]))) - years(date.fromisoformat(turn["from"])))
            for turn in curve.get("turns", [])
        )

    if item["type"] == "overnight-swap":
        months = {"annual": 12, "semiannual": 6, "quarterly": 3}[item["payments"]]
        length = int(item["tenor"][:-1]) * 12
        days = [spot, *(after(spot, f"{m}M") for m in range(months, length + 1, months))]
        miss = lambda p: p(spot) - p(days[-1]) - rate * sum(fraction(item, s, e) * p(e) for s, e in zip(days, days[1:]))
    else:
        start, days = (spot, [after(spot, item["tenor"])]) if item["type"] == "deposit" else (after(spot, item["start"]), [after(spot, item["end"])])
        miss = lambda p: p(start) - p(days[-1]) * (1 + rate * fraction(item, start, days[-1]))
    return days[-1], lambda log_of: miss(lambda u: exp(log_of(u) - taken(u))), taken


SOLVED = {}


def log_of_instruments(curve, u):
    key = json.dumps(curve)
    if key not in SOLVED:
        ends, misses, taken = zip(*(miss_of(curve, item) for item in curve["items"]))
        SOLVED[key] = solved(curve["interpolation"], ends, misses), taken[0]
    log_of, taken = SOLVED[key]
    return log_of(u) - taken(u)


def log_of_forwards(market, curve, side, u):
    """Of a base curve or a yield: the side's own."""
    key = json.dumps([market, side])
    if key not in SOLVED:
        ends = [date.fromisoformat(row["at"]) for row in curve["rows"]]

        def miss_of_row(row, end):
            return lambda log_of: log(price(market, end, settlement_of(market, end), side, implied=log_of)[0] / on(side, row["value"]))

        SOLVED[key] = solved(curve["interpolation"], ends, [miss_of_row(row, end) for row, end in zip(curve["rows"], ends)])
    return SOLVED[key](u)


def settlement_of(market, maturity):
    asset = market["asset"]
    return maturity if asset["kind"] in ("currency-pair", "commodity") else settled(maturity, asset["settlementLag"])


def is_implied(curve):
    return isinstance(curve, dict) and curve.get("kind") == "forwards"


# ---- the forward -------------------------------------------------------------------------------------------------


def two_way(value):
    return (value["bid"], value["offer"]) if isinstance(value, dict) and "bid" in value else (value, value)


def on(side, value):
    """The dealer's figure of a two-way number; fair is the mean."""
    bid, offer = (mpf(str(x)) for x in two_way(value))
    return {"bid": bid, "offer": offer, "fair": (bid + offer) / 2}[side]


def fee_on(side, fee):
    """Who sells forward lends the asset at the fee's bid."""
    bid, offer = two_way(fee)
    as_rate = lambda r: r if isinstance(r, dict) else {"rate": r}
    value = {"bid": as_rate(offer)["rate"], "offer": as_rate(bid)["rate"]}
    value["fair"] = (mpf(str(as_rate(bid)["rate"])) + mpf(str(as_rate(offer)["rate"]))) / 2
    return {**as_rate(bid), "rate": value[side]}


def price(market, maturity, settlement, side, log_of=log_factor, implied=None):
    """`implied` stands for what quoted forwards imply while they are solved for."""
    quoted = market["base"]["curve"] if "base" in market else market.get("income", {}).get("yield", 0)
    if is_implied(quoted) and implied is None:
        implied = lambda u: log_of_forwards(market, quoted, side, u)
    asset = market["asset"]
    spot_date = settled(AS_OF, asset["settlementLag"])
    hold = spot_date if asset["kind"] in ("currency-pair", "commodity") else AS_OF
    spot = on(side, market["spot"])
    cost = market.get("hedgeCost", {})
    spot *= 1 + mpf(str(cost.get("buy", 0))) if side == "offer" else 1
    spot *= 1 - mpf(str(cost.get("sell", 0))) if side == "bid" else 1

    def factor(funding, u, lends):
        spread = 0 if side == "fair" else funding.get("lendSpread" if lends else "borrowSpread", 0)
        return exp(log_of(funding["curve"], u) - mpf(str(spread)) * years(u))

    def p(u):
        return factor(market["funding"], u, side == "bid")

    if "base" in market and is_implied(quoted):
        units = exp(implied(settlement) - implied(spot_date))
        return spot * p(spot_date) * units / p(settlement), units, spot, p(spot_date), p(settlement), mpf(0)
    if "base" in market:
        units = factor(market["base"], settlement, side == "offer") / factor(market["base"], spot_date, side == "offer")
        return spot * p(spot_date) * units / p(settlement), units, spot, p(spot_date), p(settlement), mpf(0)

    income = market.get("income", {})
    g = on(side, income.get("passThrough", 1))
    end = {"fair": None, "offer": "low", "bid": "high"}[side]

    def units_after(u):
        paid = implied(maturity) - implied(u) if is_implied(quoted) else log_of_rate(income.get("yield", 0), u, maturity)
        n = exp(paid + log_of_rate(fee_on(side, market.get("lendingFee", 0)), u, maturity))
        for row in income.get("proportional", []):
            if u < date.fromisoformat(row["ex"]) <= maturity and hold < date.fromisoformat(row["ex"]):
                d = mpf(str(row.get(end, row["fraction"])))
                n *= (1 - d) / (1 - (1 - g) * d)
        return n

    taken = mpf(0)
    for row in income.get("cash", []):
        ex = date.fromisoformat(row["ex"])
        if hold < ex <= maturity:
            amount = mpf(str(row.get(end, row["amount"])))
            taken += g * amount * units_after(ex) * p(date.fromisoformat(row.get("pay", row["ex"])))
    units = units_after(hold)
    forward = (spot * p(spot_date) * units - taken) / p(settlement)
    return forward, units, spot, p(spot_date), p(settlement), taken / p(settlement)


# ---- the cases ---------------------------------------------------------------------------------------------------

dice = random.Random(20261201)


def between(low, high, digits):
    return round(dice.uniform(low, high), digits)


def some_rate():
    kind = dice.randrange(3)
    if kind == 0:
        return between(-0.01, 0.06, 4)
    compounding = dice.choice(["simple", *TIMES]) if kind == 1 else "continuous"
    return {"rate": between(-0.01, 0.06, 4), "compounding": compounding, "dayCount": dice.choice(["ACT/360", "ACT/365.FIXED"])}


def some_pillars(quote, interpolation):
    curve = {"kind": "pillars", "quote": quote}
    if quote == "zero":
        curve |= {"compounding": dice.choice(["continuous", "annual"]), "dayCount": "ACT/365.FIXED"}
    curve |= {"interpolation": interpolation, "pillars": []}
    level = between(0.005, 0.04, 4)
    for months in (1, 3, 6, 12, 24):
        day = AS_OF + timedelta(30 * months + dice.randrange(5))
        zero = level + between(-0.004, 0.004, 4)
        value = round(float(exp(-mpf(zero) * years(day))), 8) if quote == "factor" else round(zero, 4)
        curve["pillars"].append({"at": day.isoformat(), "value": value})
    return curve


def some_instruments(interpolation):
    level = between(0.01, 0.04, 4)
    rate = lambda: round(level + between(-0.003, 0.003, 4), 4)
    deposits = [{"type": "deposit", "tenor": tenor, "rate": rate(), "dayCount": "ACT/360"} for tenor in ("1W", "1M", "3M")]
    agreements = [{"type": "fra", "start": f"{m}M", "end": f"{m + 3}M", "rate": rate(), "dayCount": "ACT/360"} for m in (3, 6)]
    payments = dice.choice(["annual", "semiannual", "quarterly"])
    swaps = [{"type": "overnight-swap", "tenor": tenor, "rate": rate(), "dayCount": "ACT/365.FIXED", "payments": payments} for tenor in ("1Y", "2Y", "3Y")]
    return {
        "kind": "instruments",
        "interpolation": interpolation,
        "spotLag": 2,
        "items": deposits + agreements + swaps,
        "turns": [{"from": "2026-12-31", "to": "2027-01-04", "spread": between(-0.01, 0.02, 4)}],
    }


def quoted_forwards(market, interpolation):
    """Near to what funding alone would make of them."""
    spot = sum(market["spot"].values()) / 2
    digits = 5 if market["asset"]["kind"] == "currency-pair" else 2
    rows = []
    for day in (date(2026, 12, 21), date(2027, 3, 17), date(2027, 9, 15), date(2028, 9, 20)):
        mean = spot * float(exp(mpf(between(-0.01, 0.02, 4)) * years(day)))
        half = spot * between(0.0001, 0.001, 5)
        rows.append({"at": day.isoformat(), "value": {"bid": round(mean - half, digits), "offer": round(mean + half, digits)}})
    quoted = {"quoted": "outright"} if market["asset"]["kind"] == "currency-pair" else {}
    return {"kind": "forwards", "interpolation": interpolation, **quoted, "rows": rows}


def some_samples():
    days = [AS_OF + timedelta(n) for n in (90, 200, 380, 800)]
    rows = []
    for _ in range(12):
        rate = between(0.005, 0.05, 4)
        rows.append([round(float(exp(-mpf(rate) * years(day))), 6) for day in days])
    return {"kind": "random", "model": "samples", "dates": [day.isoformat() for day in days], "factors": rows}


def some_meetings():
    moves = lambda p: [{"by": -0.0025, "probability": p}, {"by": 0, "probability": round(1 - p, 2)}]
    days = ("2026-12-17", "2027-02-04", "2027-03-18", "2027-04-29")
    return {
        "kind": "random",
        "model": "policy-meetings",
        "overnight": between(0.01, 0.04, 4),
        "meetings": [{"date": day, "moves": moves(between(0.1, 0.9, 2))} for day in days],
    }


def short_rate(model):
    return {
        "kind": "random",
        "model": model,
        "r0": between(0.01, 0.05, 4),
        "meanReversion": between(0.05, 0.8, 3),
        "longRun": between(0.01, 0.05, 4),
        "volatility": between(0.03, 0.09, 3) if model == "cox-ingersoll-ross" else between(0.004, 0.02, 4),
    }


CURVES = {
    "number": lambda: between(0.0, 0.05, 4),
    "flat rate": some_rate,
    "zero pillars, log-linear": lambda: some_pillars("zero", "log-linear"),
    "zero pillars, linear-zero": lambda: some_pillars("zero", "linear-zero"),
    "factor pillars, log-linear": lambda: some_pillars("factor", "log-linear"),
    "factor pillars, linear-zero": lambda: some_pillars("factor", "linear-zero"),
    "Vasicek": lambda: short_rate("vasicek"),
    "Cox–Ingersoll–Ross": lambda: short_rate("cox-ingersoll-ross"),
    "Ho–Lee": lambda: {"kind": "random", "model": "ho-lee", "volatility": between(0.005, 0.02, 4), "fit": some_pillars("zero", "log-linear")},
    "Hull–White": lambda: {
        "kind": "random",
        "model": "hull-white",
        "meanReversion": between(0.05, 0.5, 3),
        "volatility": between(0.005, 0.02, 4),
        "fit": between(0.01, 0.04, 4),
    },
    "meetings": some_meetings,
    "scenarios": lambda: {
        "kind": "random",
        "model": "scenarios",
        "scenarios": [
            {"weight": 0.5, "curve": between(0.02, 0.03, 4)},
            {"weight": 0.3, "curve": some_pillars("zero", "linear-zero")},
            {"weight": 0.2, "curve": between(0.04, 0.06, 4)},
        ],
    },
    "samples": some_samples,
}


def some_income(spot):
    cash = []
    for ex in ("2026-11-20", "2027-01-14", "2027-03-10", "2027-06-09", "2028-01-13"):
        amount = round(spot * dice.uniform(0.002, 0.012), 2)
        row = {"ex": ex, "amount": amount}
        if dice.random() < 0.7:
            row["pay"] = (date.fromisoformat(ex) + timedelta(14)).isoformat()
        if dice.random() < 0.6:
            row |= {"low": round(amount * 0.9, 4), "high": round(amount * 1.15, 4)}
        cash.append(row)
    proportional = [{"ex": "2027-04-08", "fraction": 0.011, "low": 0.01, "high": 0.012}, {"ex": "2027-03-10", "fraction": 0.004}]
    return {
        "cash": cash,
        "proportional": proportional[: dice.randrange(3)],
        "yield": some_rate() if dice.random() < 0.4 else 0,
        "passThrough": dice.choice([1, 0.85, {"bid": 1, "offer": 0.7}]),
    }


def some_market(kind, curve):
    spot = {"share": 100.0, "index": 4200.0, "commodity": 82.5, "currency-pair": 1.1}[kind] * dice.uniform(0.8, 1.2)
    digits = 4 if kind == "currency-pair" else 2
    half = spot * 0.0005
    asset = {
        "kind": kind,
        "name": {"share": "Brackwater Mills", "index": "Northmoor 40", "commodity": "Tallow, grade B", "currency-pair": "EUR/USD"}[kind],
        "currency": "USD" if kind == "currency-pair" else "EUR",
        "settlementLag": dice.choice([0, 1, 2, 3]),
        "calendars": [],
        "holidays": [day.isoformat() for day in HOLIDAYS],
        "tick": 0.0001 if kind == "currency-pair" else 0.01,
    }
    market = {
        "asOf": AS_OF.isoformat(),
        "asset": asset,
        "spot": {"bid": round(spot - half, digits), "offer": round(spot + half, digits)},
        "funding": {"curve": curve, "lendSpread": -between(0, 0.003, 4), "borrowSpread": between(0, 0.003, 4)},
    }
    if dice.random() < 0.5:
        market["hedgeCost"] = {"buy": between(0, 0.004, 4), "sell": between(0, 0.001, 4)}
    if kind == "currency-pair":
        asset["base"] = "EUR"
        market["base"] = {"curve": some_pillars("zero", "log-linear"), "lendSpread": -0.001, "borrowSpread": 0.0015}
    else:
        market["income"] = some_income(spot)
        market["lendingFee"] = dice.choice([0.003, {"bid": 0.001, "offer": 0.004}, {"rate": 0.002, "compounding": "simple", "dayCount": "ACT/360"}])
    return market


def margin_of(margin, spot, maturity):
    amount = mpf(str(margin["amount"]))
    per = {"price": mpf(1), "bp-of-spot": spot / 10000, "bp-per-year": spot / 10000 * years(maturity)}
    return amount * per[margin["unit"]]


def expectations(request, maturity, settlement):
    market, inquiry = request["market"], request["inquiry"]
    fair, bid, offer = (price(market, maturity, settlement, side) for side in ("fair", "bid", "offer"))
    spot = fair[2]
    tolerance = float(mpf(spot) * mpf("3e-13"))
    tick = mpf(str(market["asset"]["tick"]))
    margin = margin_of(inquiry["margin"], spot, maturity)
    quoted = {"bid": floor((bid[0] - margin) / tick) * tick, "offer": ceil((offer[0] + margin) / tick) * tick}
    if inquiry["client"] != "two-way":
        quoted["bid" if inquiry["client"] == "buys" else "offer"] = None
    figures = {
        "/fair": fair[0],
        "/breakEven/bid": bid[0],
        "/breakEven/offer": offer[0],
        "/quote/bid": quoted["bid"],
        "/quote/offer": quoted["offer"],
        "/margin": margin,
        "/carry/points": fair[0] - spot,
        "/carry/cash": -fair[5],
    }
    factors = {"/factors/spot": fair[3], "/factors/settlement": fair[4], "/factors/units": fair[1]}
    curve = market["funding"]["curve"]
    if isinstance(curve, dict) and curve.get("kind") == "random":
        factors["/random/expectedFactor"] = fair[4]
        of_log = law(curve, settlement)
        if of_log:
            average = price(market, maturity, settlement, "fair", lambda c, u: law(c, u)[0] if c is curve and u > AS_OF else log_factor(c, u))
            factors["/random/logFactor/mean"] = of_log[0]
            factors["/random/logFactor/variance"] = of_log[1]
            figures["/random/averageRateForward"] = average[0]
            figures["/random/gap"] = fair[0] - average[0]
    expected = [
        {"at": "/ok", "value": True},
        {"at": "/result/dates/spot", "value": settled(AS_OF, market["asset"]["settlementLag"]).isoformat()},
        {"at": "/result/dates/settlement", "value": settlement.isoformat()},
    ]
    for at, value in figures.items():
        row = {"at": "/result" + at, "value": None if value is None else float(value)}
        expected.append(row if value is None else {**row, "tolerance": tolerance})
    for at, value in factors.items():
        expected.append({"at": "/result" + at, "value": float(value), "tolerance": 4e-14})
    return expected


def case_of_forwards(kind, interpolation):
    market = some_market(kind, some_pillars("zero", "log-linear"))
    curve = quoted_forwards(market, interpolation)
    if kind == "currency-pair":
        market["base"] = {"curve": curve}
    else:
        market["income"]["yield"] = curve
    return case(kind, f"quoted forwards, {interpolation}", market)


def case(kind, name, made=None):
    market = made or some_market(kind, CURVES[name]())
    maturity = dice.choice([date(2026, 12, 14), date(2027, 3, 10), date(2027, 6, 18), date(2027, 11, 30), date(2029, 3, 1)])
    lag = market["asset"]["settlementLag"]
    settlement = maturity if kind in ("currency-pair", "commodity") else settled(maturity, lag)
    request = {
        "format": "forwright/1",
        "task": "quote",
        "market": market,
        "inquiry": {
            "client": dice.choice(["two-way", "two-way", "buys", "sells"]),
            "quantity": dice.choice([1, 10000, 2500000]),
            "maturity": maturity.isoformat(),
            "margin": {"unit": dice.choice(["price", "bp-of-spot", "bp-per-year"]), "amount": between(0, 5, 1) if kind != "currency-pair" else 0},
        },
    }
    if request["inquiry"]["margin"]["unit"] == "price":
        request["inquiry"]["margin"]["amount"] = round(request["inquiry"]["margin"]["amount"] / 100, 3)
    return {"name": f"{kind}, {name}", "source": SOURCE, "request": request, "expect": expectations(request, maturity, settlement)}


def main():
    kinds = ("share", "index", "commodity", "currency-pair")
    cases = [case(kind, name) for kind in kinds for name in CURVES]
    # What was added later stands at the end, so that the rows above stay as they are.
    for interpolation in ("log-linear", "linear-zero"):
        for kind in ("share", "currency-pair"):
            cases.append(case(kind, f"instruments, {interpolation}", some_market(kind, some_instruments(interpolation))))
        for kind in kinds:
            cases.append(case_of_forwards(kind, interpolation))
    rows = ",\n".join("    " + json.dumps(row, ensure_ascii=False) for row in cases)
    about = json.dumps("Every kind of asset under every kind of curve. Written by reckoning.py.")
    Path(__file__).with_name("reckoned.json").write_text(f'{{\n  "about": {about},\n  "cases": [\n{rows}\n  ]\n}}\n', encoding="utf-8")


if __name__ == "__main__":
    main()
