#include "contract/place.hpp"

namespace forwright::contract {

void appendToPointer(std::string& pointer, std::string_view name) {
    pointer += '/';
    for (const char c : name) {
        if (c == '~') {
            pointer += "~0";
        } else if (c == '/') {
            pointer += "~1";
        } else {
            pointer += c;
        }
    }
}

std::string Place::pointer() const {
    if (kind_ == Kind::whole) {
        return {};
    }
    std::string pointer = around_->pointer();
    appendToPointer(pointer, kind_ == Kind::member ? name_ : std::string_view{std::to_string(index_)});
    return pointer;
}

} // namespace forwright::contract
