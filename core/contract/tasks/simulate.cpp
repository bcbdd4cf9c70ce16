// Task `simulate`: the random curve's discount factor and the forward by simulation, whole, in blocks, or put
// together from blocks.
#include "desk/simulate.hpp"

#include "contract/inquiry_reader.hpp"
#include "contract/market_reader.hpp"
#include "contract/result_writer.hpp"
#include "contract/task.hpp"

#include <cmath>
#include <limits>
#include <utility>

namespace forwright::contract {

namespace {

using discounting::BlockSums;
using discounting::SimulationMethod;
using forward::Market;

constexpr int largestInteger = std::numeric_limits<int>::max();
constexpr std::size_t numbersInRow = 7;
/// Beyond any count of a part that these blocks can make, and whole in a double.
constexpr Range countRange{0.0, 0x1p50, false, false};

/// No plan has more.
constexpr int mostBlocks = 10'000;

discounting::SimulationPlan readPlan(Reader& request) {
    discounting::SimulationPlan plan;
    plan.method = request.choice("method", {SimulationMethod::pseudo, SimulationMethod::quasi},
                                 SimulationMethod::quasi);
    plan.paths = request.optional("paths", "65536").integer(1, largestInteger).value_or(65536);
    plan.seed =
        static_cast<std::uint64_t>(request.optional("seed", "1").integer(0, largestInteger).value_or(1));
    return plan;
}

std::optional<desk::BlockRange> readBlocks(const Value& value) {
    Reader object{value};
    const auto from = object.required("from", "the first block, counted from 0").integer(0, mostBlocks);
    const auto to = object.required("to", "the block after the last").integer(0, mostBlocks);
    return from && to ? std::optional{desk::BlockRange{*from, *to}} : std::nullopt;
}

bool readTruth(const Value& value, bool fallback) {
    if (!value.present()) {
        return fallback;
    }
    if (value.json().kind() != Json::Kind::boolean) {
        value.wrongType("true or false");
        return fallback;
    }
    return value.json().boolean();
}

/// A block's sums, in the order of `BlockSums`; the last is null where it is not finite.
std::optional<BlockSums> readSums(const Value& row) {
    std::vector<double> numbers;
    const bool isList = row.rows(
        [&](const Value& cell, std::size_t index) {
            const bool isNull = cell.present() && cell.json().kind() == Json::Kind::null;
            if (isNull && index + 1 == numbersInRow) {
                numbers.push_back(std::numeric_limits<double>::infinity());
            } else if (const auto number = cell.number(index == 0 ? positive : anyNumber)) {
                numbers.push_back(*number);
            }
        },
        numbersInRow);
    if (isList && row.json().size() != numbersInRow) {
        row.fault("row-length", "A block has seven sums.");
    }
    if (numbers.size() != numbersInRow) {
        return std::nullopt;
    }
    return BlockSums{numbers[0], numbers[1], numbers[2], numbers[3], numbers[4], numbers[5], numbers[6]};
}

std::optional<desk::SimulatedPart> readPart(const Value& value) {
    Reader object{value};
    desk::SimulatedPart part;
    const auto from = object.required("from", "its first block").integer(0, mostBlocks);
    const Value sums = object.required("sums", "the sums of each block");
    sums.rows([&](const Value& row, std::size_t /*index*/) {
        if (const auto read = readSums(row)) {
            part.sums.push_back(*read);
        }
    });
    const Value counts = object.required("counts", "the outcomes by bin");
    counts.rows([&](const Value& cell, std::size_t /*index*/) {
        const auto count = cell.number(countRange);
        if (count && *count != std::floor(*count)) {
            cell.fault("not-whole", "An outcome is counted in whole parts of a path.");
        } else if (count) {
            part.counts.push_back(static_cast<std::int64_t>(*count));
        }
    });
    if (!from) {
        return std::nullopt;
    }
    part.from = *from;
    return part;
}

std::vector<desk::SimulatedPart> readParts(const Value& list) {
    std::vector<desk::SimulatedPart> parts;
    list.rows([&](const Value& row, std::size_t /*index*/) {
        if (auto part = readPart(row)) {
            parts.push_back(std::move(*part));
        }
    });
    if (list.isList() && list.json().size() == 0) {
        list.fault("empty-list",
                   "Hand in at least one part, or leave the member out to have all blocks worked out.");
    }
    return parts;
}

std::optional<double> ifFinite(double number) {
    return std::isfinite(number) ? std::optional{number} : std::nullopt;
}

void writePart(Writer& writer, const desk::SimulatedPart& part) {
    writer.key("part").beginObject();
    writer.member("from", part.from);
    writeList(writer, "sums", part.sums, [&](const BlockSums& sums) {
        writer.beginList();
        writer.value(sums.weight);
        writer.value(sums.factor);
        writer.value(sums.value);
        writer.value(sums.factorSquared);
        writer.value(sums.product);
        writer.value(sums.valueSquared);
        writer.value(ifFinite(sums.ratio));
        writer.endList();
    });
    writeList(writer, "counts", part.counts, [&](std::int64_t count) { writer.value(count); });
    writer.endObject();
}

template <class Number>
void writeFactorAndForward(Writer& writer, std::string_view name, const Number& factor,
                           const Number& forward) {
    writer.key(name).beginObject();
    writer.member("factor", factor);
    writer.member("forward", forward);
    writer.endObject();
}

void writeHistogram(Writer& writer, const desk::Simulated& result) {
    const discounting::BinCounts& counts = result.counts;
    writer.key("histogram").beginObject();
    writer.member("low", result.bins.low);
    writer.member("high", result.bins.high);
    writer.member("below", counts.front());
    writer.key("counts").beginList();
    for (std::size_t bin = 1; bin + 1 < counts.size(); ++bin) {
        writer.value(counts[bin]);
    }
    writer.endList();
    writer.member("above", counts.back());
    writeList(writer, "edges", result.edges, [&](double edge) { writer.value(edge); });
    if (!result.lawCounts.empty()) {
        writeList(writer, "law", result.lawCounts, [&](double count) { writer.value(count); });
    }
    writer.endObject();
}

void writeFan(Writer& writer, const desk::RateFan& fan) {
    writer.key("fan").beginObject();
    writer.member("by", fan.closedForm ? "closed-form" : "simulation");
    if (!fan.closedForm) {
        writer.member("paths", fan.paths);
    }
    writeList(writer, "probabilities", fan.probabilities,
              [&](double probability) { writer.value(probability); });
    writeList(writer, "steps", fan.steps, [&](const desk::RateStep& step) {
        writer.beginObject();
        writer.member("from", step.from);
        writer.member("to", step.to);
        writeList(writer, "rates", step.quantiles, [&](double rate) { writer.value(rate); });
        writer.endObject();
    });
    writeList(writer, "drawn", fan.drawn, [&](const std::vector<double>& path) {
        writer.beginList();
        for (const double rate : path) {
            writer.value(rate);
        }
        writer.endList();
    });
    writer.endObject();
}

void writeWhole(Writer& writer, const desk::SimulationAsked& asked, const desk::Simulated& result) {
    writer.beginObject();
    writer.member("settlement", result.schedule.settlement);
    writer.member("method", nameOf(asked.plan.method));
    writer.member("paths", result.estimate.paths);
    writer.key("blocks").beginObject();
    writer.member("done", result.blocksDone);
    writer.member("count", result.blocks);
    writer.endObject();
    writeFactorAndForward(writer, "estimate", result.estimate.factor, result.estimate.price);
    writeFactorAndForward(writer, "standardError", result.estimate.factorError, result.estimate.priceError);
    if (result.interval95) {
        writer.key("interval95").beginObject();
        writer.member("low", result.interval95->bid);
        writer.member("high", result.interval95->offer);
        writer.endObject();
    }
    writeFactorAndForward(writer, "closedForm", result.closedForm.factor, result.closedForm.forward);
    writer.member("averageRateFactor", result.averageRateFactor);
    writeFactorAndForward(writer, "apart", result.apart.factor, result.apart.forward);
    writer.member("pathBias", result.pathBias);
    writeHistogram(writer, result);
    writeList(writer, "forwards", result.forwards, [&](const desk::ForwardReckoned& row) {
        writer.beginObject();
        writer.member("code", row.code);
        writer.member("forward", row.forward);
        writer.member("difference", row.difference);
        writer.member("onQuantity", row.onQuantity);
        writer.memberIfAny("errorOnQuantity", row.errorOnQuantity);
        writer.endObject();
    });
    if (result.fan) {
        writeFan(writer, *result.fan);
    }
    writer.endObject();
}

void answerWhole(const desk::SimulationAsked& asked, const outcome::Outcome<desk::Simulated>& outcome,
                 Findings& findings, Writer& writer) {
    if (!outcome) {
        findings.faults(Place{}, outcome.faults());
        return;
    }
    findings.notices(Place{}, outcome.value().notices);
    writeWhole(writer, asked, outcome.value());
}

void answerBlocks(const Market& market, const desk::SimulationAsked& asked, const desk::BlockRange& blocks,
                  Findings& findings, Writer& writer) {
    const outcome::Outcome<desk::SimulatedPart> part = desk::simulateBlocks(market, asked, blocks);
    if (!part) {
        findings.faults(Place{}, part.faults());
        return;
    }
    writer.beginObject();
    writer.key("blocks").beginObject();
    writer.member("done", static_cast<long>(part.value().sums.size()));
    writer.member("count", asked.plan.blocks());
    writer.endObject();
    writePart(writer, part.value());
    writer.endObject();
}

} // namespace

Calculation readSimulate(Reader& request) {
    const auto market = readMarket(request.required("market", "the market that the forward is priced in"));
    desk::SimulationAsked asked;
    const auto maturity = readMaturity(request);
    asked.quantity = request.number("quantity", positive, 1.0);
    asked.plan = readPlan(request);
    const Value blocksValue = request.optional("blocks");
    const Value partsValue = request.optional("parts");
    asked.fan = readTruth(request.optional("fan", "true"), true);
    if (blocksValue.present() && partsValue.present()) {
        partsValue.fault("not-applicable",
                         "Blocks are worked out, or parts put together: ask for one of the two.");
        return {};
    }
    const auto blocks = readBlocks(blocksValue);
    std::vector<desk::SimulatedPart> parts = readParts(partsValue);
    if (!market || !maturity || blocksValue.present() != blocks.has_value()) {
        return {};
    }
    asked.maturity = *maturity;
    if (blocks) {
        return [market = *market, asked, blocks = *blocks](Findings& findings, Writer& writer) {
            answerBlocks(market, asked, blocks, findings, writer);
        };
    }
    return [market = *market, asked, parts = std::move(parts),
            together = partsValue.present()](Findings& findings, Writer& writer) {
        answerWhole(asked, together ? desk::combine(market, asked, parts) : desk::simulate(market, asked),
                    findings, writer);
    };
}

} // namespace forwright::contract
