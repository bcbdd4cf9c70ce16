#include "contract/task.hpp"

#include <array>

namespace forwright::contract {

// Each in its own file of this folder.
Calculation readQuote(Reader& request);
Calculation readTenors(Reader& request);
Calculation readPath(Reader& request);

std::span<const Task> tasks() {
    static constexpr std::array all{
        Task{"quote", readQuote},
        Task{"tenors", readTenors},
        Task{"path", readPath},
    };
    return all;
}

} // namespace forwright::contract
