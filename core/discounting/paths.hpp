#pragma once

#include <cstddef>
#include <cstdint>
#include <memory>
#include <span>

namespace forwright::discounting {

/// Paths are made so many at a time, so that what they are made of stays near the processor. Everything about
/// a tile lies number by number (or date by date), and within that path by path: `all[which * tilePaths +
/// path]`.
inline constexpr std::size_t tilePaths = 128;

/// Turns random words into paths of ln D, one value at each of the dates that it was made for. Immutable; a
/// path is a function of its own words alone, so it does not matter who makes it, or with which others.
class PathMaker {
  public:
    virtual ~PathMaker() = default;
    /// How many random words a path takes; the first matter most.
    [[nodiscard]] virtual std::size_t numbers() const = 0;
    /// Whether the first number's effect has no bound at the ends of its range, as a normal number's has
    /// none: evenly spread points then do best where they lie closer together there, each weighing less.
    [[nodiscard]] virtual bool firstIsUnbounded() const { return false; }
    /// How many values one path has to work out, roughly: what its time is proportional to.
    [[nodiscard]] virtual double work() const = 0;
    /// The first `count` paths of a tile; `words` evenly spread over all 32-bit words make paths spread as
    /// the law of the random curve wants.
    virtual void make(const std::uint32_t* words, std::size_t count, double* logFactors) const = 0;
    /// The same paths' mirror images: those of the complements of all their words. `logFactors` holds the
    /// paths themselves, and their images afterwards.
    virtual void mirror(const std::uint32_t* words, std::size_t count, double* logFactors) const;
};
using PathMakerPtr = std::shared_ptr<const PathMaker>;

} // namespace forwright::discounting
