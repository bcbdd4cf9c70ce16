#include "contract/task.hpp"

#include <array>

namespace forwright::contract {

// Each in its own file of this folder.
Calculation readQuote(Reader& request);
Calculation readTenors(Reader& request);
Calculation readPath(Reader& request);
Calculation readSimulate(Reader& request);
Calculation readFutures(Reader& request);
Calculation readHedgeCover(Reader& request);
Calculation readCompare(Reader& request);
Calculation readCurveTask(Reader& request);
Calculation readCalendarTask(Reader& request);

std::span<const Task> tasks() {
    static constexpr std::array all{
        Task{"quote", readQuote},       Task{"tenors", readTenors},   Task{"path", readPath},
        Task{"simulate", readSimulate}, Task{"futures", readFutures}, Task{"hedge-cover", readHedgeCover},
        Task{"compare", readCompare},   Task{"curve", readCurveTask}, Task{"calendar", readCalendarTask},
    };
    return all;
}

} // namespace forwright::contract
