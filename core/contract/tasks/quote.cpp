// Task `quote`: the price of one forward, with everything that explains it.
#include "forward/quote.hpp"

#include "contract/inquiry_reader.hpp"
#include "contract/market_reader.hpp"
#include "contract/result_writer.hpp"
#include "contract/task.hpp"
#include "forward/carry.hpp"
#include "forward/ledger.hpp"
#include "forward/random.hpp"
#include "forward/sensitivities.hpp"

#include <algorithm>
#include <array>
#include <bitset>
#include <cmath>
#include <iterator>
#include <utility>
#include <variant>

namespace forwright::contract {

namespace {

using discounting::Parameter;
using forward::Inquiry;
using forward::Market;
using forward::Quote;

/// The optional blocks of a result, in its order.
enum class Block : std::size_t { income, sensitivities, ledger, random, bridge, total, working };
constexpr std::array<std::string_view, 7> blockNames{"income", "sensitivities", "ledger", "random",
                                                     "bridge", "total",         "working"};
std::string_view nameOf(Block block) {
    return blockNames[static_cast<std::size_t>(block)];
}

class Blocks {
  public:
    void add(Block block) { wanted_.set(static_cast<std::size_t>(block)); }
    [[nodiscard]] bool has(Block block) const { return wanted_[static_cast<std::size_t>(block)]; }

  private:
    std::bitset<blockNames.size()> wanted_;
};

Blocks readWant(Reader& request) {
    const Value value =
        request.optional("want", R"(["income","sensitivities","ledger","random","bridge","total"])");
    Blocks blocks;
    if (!value.present()) {
        for (const Block block : {Block::income, Block::sensitivities, Block::ledger, Block::random,
                                  Block::bridge, Block::total}) {
            blocks.add(block);
        }
        return blocks;
    }
    value.rows([&blocks](const Value& row, std::size_t /*index*/) {
        if (const auto block = row.choice({Block::income, Block::sensitivities, Block::ledger, Block::random,
                                           Block::bridge, Block::total, Block::working})) {
            blocks.add(*block);
        }
    });
    return blocks;
}

void writeDates(Writer& writer, const forward::Schedule& schedule) {
    writer.key("dates").beginObject();
    writer.member("spot", schedule.spot);
    writer.member("maturity", schedule.maturity);
    writer.member("settlement", schedule.settlement);
    writer.member("days", schedule.days);
    writer.member("holdFrom", schedule.holdFrom);
    writeList(writer, "resolutions", schedule.resolutions, [&](const forward::Resolution& resolution) {
        writer.beginObject();
        writer.member("code", resolution.code);
        writer.member("date", resolution.date);
        writer.member("rule", resolution.rule);
        writer.endObject();
    });
    writer.endObject();
}

void writeCarry(Writer& writer, const forward::Carry& carry) {
    writer.key("carry").beginObject();
    writer.member("spot", carry.spot);
    writer.member("funding", carry.funding);
    writer.member("fee", carry.fee);
    writer.member("yield", carry.yield);
    writer.member("proportional", carry.proportional);
    writer.member("cash", carry.cash);
    writer.member("base", carry.base);
    writer.member("points", carry.points);
    writer.endObject();
}

void writePrices(Writer& writer, const Market& market, const Quote& quote) {
    writeDates(writer, quote.schedule);
    writer.member("fair", quote.fair.forward);
    writeTwoWay(writer, "breakEven", quote.bid.forward, quote.offer.forward);
    writeTwoWay(writer, "quote", quote.quotedBid, quote.quotedOffer);
    writer.member("margin", quote.margin);
    writer.member("annualised", quote.annualised);
    writer.key("factors").beginObject();
    writer.member("spot", quote.fair.spotFactor);
    writer.member("settlement", quote.fair.settlementFactor);
    writer.member("units", quote.fair.units);
    writer.endObject();
    writeCarry(writer, forward::carry(market, quote.schedule, quote.fairInputs, quote.fair));
}

void writeIncome(Writer& writer, const std::vector<forward::IncomeLine>& lines) {
    writeList(writer, "income", lines, [&](const forward::IncomeLine& line) {
        writer.beginObject();
        writer.member("at", line.at);
        writer.member("ex", line.ex);
        writer.memberIfAny("pay", line.pay);
        writer.memberIfAny("amount", line.amount);
        writer.memberIfAny("fraction", line.fraction);
        writer.member("counted", line.counted);
        writer.member("reason", line.reason);
        writer.member("effect", line.effect);
        if (line.amount) {
            writer.member("wouldTake", line.wouldTake);
        }
        writer.member("units", line.units);
        writer.member("factor", line.factor);
        writer.member("atSettlement", line.atSettlement);
        writer.endObject();
    });
}

void writeChange(Writer& writer, const std::string& at, double change) {
    writer.beginObject();
    writer.member("at", at);
    writer.member("change", change);
    writer.endObject();
}

/// The parameters of one kind, as a list where there are any.
void writeParameters(Writer& writer, std::string_view name, Parameter::Kind kind,
                     const forward::CurveSensitivity& sensitivity) {
    bool begun = false;
    for (const forward::ParameterSensitivity& entry : sensitivity.parameters) {
        if (entry.parameter.kind != kind) {
            continue;
        }
        if (!begun) {
            writer.key(name).beginList();
            begun = true;
        }
        writeChange(writer, entry.parameter.at, entry.change);
    }
    if (begun) {
        writer.endList();
    }
}

void writeCurve(Writer& writer, std::string_view name, const forward::CurveSensitivity& sensitivity) {
    writer.key(name).beginObject();
    writer.member("parallel", sensitivity.parallel);
    writeParameters(writer, "pillars", Parameter::Kind::pillar, sensitivity);
    writeParameters(writer, "parameters", Parameter::Kind::model, sensitivity);
    writer.endObject();
}

void writeSensitivities(Writer& writer, const forward::Sensitivities& sensitivities) {
    writer.key("sensitivities").beginObject();
    writer.member("spot", sensitivities.spot);
    writeCurve(writer, "funding", sensitivities.funding);
    if (sensitivities.base) {
        writeCurve(writer, "base", *sensitivities.base);
    }
    writer.member("fee", sensitivities.fee);
    writer.member("yield", sensitivities.yield);
    if (sensitivities.yieldCurve) {
        writeCurve(writer, "yieldCurve", *sensitivities.yieldCurve);
    }
    writeList(writer, "cash", sensitivities.cash, [&](const forward::CashSensitivity& entry) {
        writeChange(writer, entry.at + "/amount", entry.change);
    });
    writer.member("day", sensitivities.day);
    writer.endObject();
}

void writeLedger(Writer& writer, std::string_view name, const forward::Ledger& ledger) {
    writer.key(name).beginObject();
    writer.member("forward", ledger.forward);
    writeList(writer, "rows", ledger.rows, [&](const forward::LedgerRow& row) {
        writer.beginObject();
        writer.member("date", row.date);
        writer.member("code", row.code);
        writer.member("text", row.text);
        writer.member("units", row.units);
        writer.member("held", row.held);
        writer.member("cash", row.cash);
        writer.member("balance", row.balance);
        writer.endObject();
    });
    writer.member("obligation", ledger.obligation);
    writer.member("closingUnits", ledger.closingUnits);
    writer.member("closingCash", ledger.closingCash);
    writer.endObject();
}

void writeLedgers(Writer& writer, const Market& market, const Quote& quote) {
    writer.key("ledger").beginObject();
    writeLedger(writer, "fair", forward::ledger(market, quote.schedule, quote.fairInputs, quote.fair));
    writeLedger(writer, "bid", forward::ledger(market, quote.schedule, quote.bidInputs, quote.bid));
    writeLedger(writer, "offer", forward::ledger(market, quote.schedule, quote.offerInputs, quote.offer));
    writer.endObject();
}

void writeTree(Writer& writer, const std::vector<discounting::RateLevels>& tree) {
    writeList(writer, "tree", tree, [&](const discounting::RateLevels& stage) {
        writer.beginObject();
        writer.member("from", stage.from);
        writeList(writer, "levels", stage.levels, [&](const discounting::RateLevel& level) {
            writer.beginObject();
            writer.member("rate", level.rate);
            writer.member("probability", level.probability);
            writer.endObject();
        });
        writeList(writer, "branches", stage.branches, [&](const discounting::RateBranch& branch) {
            writer.beginObject();
            writer.member("from", branch.from);
            writer.member("to", branch.to);
            writer.member("by", branch.by);
            writer.member("probability", branch.probability);
            writer.endObject();
        });
        writer.endObject();
    });
}

void writeAgainst(Writer& writer, const std::vector<discounting::SampleColumn>& columns) {
    writeList(writer, "against", columns, [&](const discounting::SampleColumn& column) {
        writer.beginObject();
        writer.member("date", column.date);
        writer.member("mean", column.mean);
        writer.member("standardError", column.standardError);
        writer.member("factor", column.factor);
        writer.member("errors", column.errors);
        writer.endObject();
    });
}

void writeRandom(Writer& writer, const forward::RandomView& random) {
    writer.key("random").beginObject();
    writer.member("expectedFactor", random.expectedFactor);
    writer.key("logFactor").beginObject();
    writer.member("mean", random.meanLog);
    writer.member("variance", random.varianceLog);
    writer.member("deviation", random.deviationLog);
    writer.endObject();
    writer.member("averageRateFactor", random.averageRateFactor);
    writer.member("factorGap", random.factorGap);
    writer.member("averageRateForward", random.averageRateForward);
    writer.member("gap", random.gap);
    writeList(writer, "quantiles", random.quantiles, [&](const discounting::Quantile& quantile) {
        writer.beginObject();
        writer.member("probability", quantile.probability);
        writer.member("factor", quantile.factor);
        writer.endObject();
    });
    writer.member("quantileError", random.quantileError);
    if (random.paths > 0) {
        writer.member("paths", random.paths);
    }
    writer.memberIfAny("standardError", random.standardError);
    if (random.interval95) {
        writer.key("interval95").beginObject();
        writer.member("low", random.interval95->bid);
        writer.member("high", random.interval95->offer);
        writer.endObject();
    }
    if (!random.tree.empty()) {
        writeTree(writer, random.tree);
    }
    if (!random.against.empty()) {
        writeAgainst(writer, random.against);
    }
    writer.endObject();
}

/// One side's bars; null where there are none.
void writeBridge(Writer& writer, std::string_view name, const std::vector<forward::BridgeStep>& steps) {
    if (steps.empty()) {
        writer.key(name).raw("null");
        return;
    }
    writeList(writer, name, steps, [&](const forward::BridgeStep& step) {
        writer.beginObject();
        writer.member("code", step.code);
        writer.member("total", step.total);
        writer.member("change", step.change);
        writer.member("level", step.level);
        writer.endObject();
    });
}

void writeTotal(Writer& writer, const forward::OnQuantity& total) {
    writer.key("total").beginObject();
    writeTwoWay(writer, "notional", total.notionalBid, total.notionalOffer);
    writeTwoWay(writer, "hedgeUnits", total.hedgeUnits.bid, total.hedgeUnits.offer);
    writer.member("margin", total.margin);
    writer.member("fundingBasisPoint", total.fundingBasisPoint);
    writer.member("day", total.day);
    writer.member("gap", total.gap);
    writer.endObject();
}

/// Whether every figure on the whole quantity is a number; each figure a unit is.
bool isFinite(const forward::OnQuantity& total) {
    const double figures[] = {total.notionalBid.value_or(0.0),
                              total.notionalOffer.value_or(0.0),
                              total.hedgeUnits.bid,
                              total.hedgeUnits.offer,
                              total.margin,
                              total.fundingBasisPoint,
                              total.day.value_or(0.0),
                              total.gap.value_or(0.0)};
    return std::all_of(std::begin(figures), std::end(figures),
                       [](double figure) { return std::isfinite(figure); });
}

void answerTotal(Writer& writer, Findings& findings, const forward::OnQuantity& total) {
    if (!isFinite(total)) {
        findings.faults(Place{},
                        {{"/inquiry/quantity", "not-finite",
                          "On this quantity the amounts are too large to be numbers; give a smaller one."}});
        return;
    }
    writeTotal(writer, total);
}

void writeFigure(Writer& writer, std::string_view name, const std::variant<double, dates::Date>& figure) {
    writer.key(name);
    std::visit([&writer](const auto& value) { writer.value(value); }, figure);
}

void writeWorking(Writer& writer, const std::vector<forward::Step>& steps) {
    writeList(writer, "working", steps, [&](const forward::Step& step) {
        writer.beginObject();
        writer.member("code", step.code);
        writer.member("side", step.side);
        writer.member("name", step.name);
        writer.member("formula", step.formula);
        writeList(writer, "given", step.given, [&](const forward::Given& given) {
            writer.beginObject();
            writer.member("symbol", given.symbol);
            writeFigure(writer, "value", given.value);
            writer.member("unit", given.unit);
            writer.endObject();
        });
        writeFigure(writer, "result", step.result);
        writer.member("unit", step.unit);
        writer.member("convention", step.convention);
        writer.member("effect", step.effect);
        writer.endObject();
    });
}

/// Distributions that are left out should be known to be.
void noticeLeftOut(Findings& findings, const std::vector<forward::IncomeLine>& lines,
                   const forward::Schedule& schedule) {
    for (const forward::IncomeLine& line : lines) {
        if (line.counted || (line.ex > schedule.holdFrom && line.ex <= schedule.maturity)) {
            continue; // left out by its treatment, which is a choice
        }
        const bool late = line.ex > schedule.maturity;
        findings.notices(
            Place{}, {{line.at + "/ex", line.reason,
                       "The distribution with ex date " + dates::toIso(line.ex) + " is left out: it falls " +
                           (late ? "after the maturity, " + dates::toIso(schedule.maturity)
                                 : "on or before the day from which the hedge is held, " +
                                       dates::toIso(schedule.holdFrom)) +
                           "."}});
    }
}

/// What hangs on estimates should be known to.
void noticeEstimates(Findings& findings, const Market& market,
                     const std::vector<forward::IncomeLine>& lines) {
    int count = 0;
    double taken = 0.0;
    for (std::size_t i = 0; i < market.income.cash.size(); ++i) {
        if (market.income.cash[i].estimated.value_or(false) && lines[i].counted) {
            ++count;
            taken += lines[i].atSettlement;
        }
    }
    if (count > 0) {
        findings.notices(Place{},
                         {{market.at + "/income/cash", "estimated-income",
                           std::to_string(count) +
                               (count == 1 ? " distribution in the price is an estimate: it takes "
                                           : " distributions in the price are estimates: they take ") +
                               numberText(taken) + " off the fair forward."}});
    }
}

void writeBlocks(Writer& writer, Findings& findings, const Market& market, const Inquiry& inquiry,
                 const Quote& quote, const Blocks& blocks) {
    const std::vector<forward::IncomeLine> lines =
        forward::incomeLines(market, quote.schedule, quote.fairInputs, quote.fair);
    noticeLeftOut(findings, lines, quote.schedule);
    noticeEstimates(findings, market, lines);
    if (blocks.has(Block::income)) {
        writeIncome(writer, lines);
    }
    const bool needSensitivities = blocks.has(Block::sensitivities) || blocks.has(Block::total);
    const forward::Sensitivities sensitivities =
        needSensitivities ? forward::sensitivities(market, quote.schedule, quote.fairInputs, quote.fair)
                          : forward::Sensitivities{};
    if (blocks.has(Block::sensitivities)) {
        writeSensitivities(writer, sensitivities);
    }
    if (blocks.has(Block::ledger)) {
        writeLedgers(writer, market, quote);
    }
    const bool needRandom = blocks.has(Block::random) || blocks.has(Block::total);
    const std::optional<forward::RandomView> random =
        needRandom ? forward::randomView(market, quote.schedule, quote.fair) : std::nullopt;
    if (random && blocks.has(Block::random)) {
        findings.notices(Place{}, random->notices);
        writeRandom(writer, *random);
    }
    if (blocks.has(Block::bridge)) {
        writer.key("bridge").beginObject();
        writeBridge(writer, "bid", forward::bridge(market, quote, forward::Side::bid));
        writeBridge(writer, "offer", forward::bridge(market, quote, forward::Side::offer));
        writer.endObject();
    }
    if (blocks.has(Block::total)) {
        answerTotal(writer, findings, forward::onQuantity(inquiry, quote, sensitivities, random));
    }
    if (blocks.has(Block::working)) {
        writeWorking(writer, quote.steps);
    }
}

void answerQuote(const Market& market, const Inquiry& inquiry, const Blocks& blocks, Findings& findings,
                 Writer& writer) {
    const outcome::Outcome<Quote> outcome = forward::quote(market, inquiry, blocks.has(Block::working));
    if (!outcome) {
        findings.faults(Place{}, outcome.faults());
        return;
    }
    const Quote& quote = outcome.value();
    findings.notices(Place{}, quote.notices);
    reviewCalendars(market, quote.schedule.settlement, findings);
    writer.beginObject();
    writePrices(writer, market, quote);
    writeBlocks(writer, findings, market, inquiry, quote, blocks);
    writer.endObject();
}

} // namespace

Calculation readQuote(Reader& request) {
    const Blocks blocks = readWant(request);
    const auto market = readMarket(request.required("market", "the market that the forward is priced in"));
    const auto inquiry = readInquiry(
        request.required("inquiry", "what the client asks for, {client, quantity, maturity, margin}"));
    if (!market || !inquiry) {
        return {};
    }
    return [market = *market, inquiry = *inquiry, blocks](Findings& findings, Writer& writer) {
        answerQuote(market, inquiry, blocks, findings, writer);
    };
}

} // namespace forwright::contract
