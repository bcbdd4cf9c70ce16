// The native program: one request a line in, one answer a line out (JSON Lines).
#include "contract/answer.hpp"

#include <algorithm>
#include <array>
#include <cerrno>
#include <cstdio>
#include <cstring>
#include <string>
#include <string_view>
#include <unistd.h>
#include <vector>

namespace {

constexpr int everyAnswerOk = 0;
constexpr int someAnswerNotOk = 1;
constexpr int unusable = 2;

constexpr std::string_view help =
    "usage: forwright [--help | --version | --schema]\n"
    "\n"
    "Reads one request a line from standard input and writes one answer a line to standard output, both as\n"
    "JSON (the contract forwright/1; --schema prints its JSON Schema). Every line gets an answer, in order.\n"
    "\n"
    "exit status  0  every answer was ok\n"
    "             1  at least one answer was not ok\n"
    "             2  the arguments cannot be used, or reading or writing failed\n";

/// Takes bytes as they come and hands whole lines on. What a line has beyond one byte more than a request may
/// have is dropped: that it is too long is still seen, and nothing more is kept of it.
class LineReader {
  public:
    template <class Take> void feed(std::string_view bytes, Take&& take) {
        while (!bytes.empty()) {
            const std::size_t end = bytes.find('\n');
            keep(bytes.substr(0, end));
            if (end == std::string_view::npos) {
                return;
            }
            finish(take);
            bytes.remove_prefix(end + 1);
        }
    }

    /// The last line may lack its line end.
    template <class Take> void close(Take&& take) {
        if (begun_) {
            finish(take);
        }
    }

  private:
    static constexpr std::size_t mostKept = forwright::contract::largestRequest + 1;
    static constexpr std::size_t ordinaryCapacity = 1 << 20;

    void keep(std::string_view bytes) {
        begun_ = begun_ || !bytes.empty();
        bytes = bytes.substr(0, mostKept - line_.size());
        const std::size_t needed = line_.size() + bytes.size();
        if (needed > line_.capacity()) {
            line_.reserve(std::min(std::max(needed, 2 * line_.capacity()), mostKept));
        }
        line_.insert(line_.end(), bytes.begin(), bytes.end());
    }

    template <class Take> void finish(Take&& take) {
        take(std::string_view{line_.data(), line_.size()});
        line_.clear();
        begun_ = false;
        if (line_.capacity() > ordinaryCapacity) {
            line_.shrink_to_fit();
        }
    }

    std::vector<char> line_; ///< its capacity is what is reserved, where a string's may be twice that
    bool begun_ = false;
};

/// Answers standard input. Written answers are flushed before every wait for more, so that a person or a
/// program on the other side of a pipe can ask one question at a time.
int answerStandardInput() {
    bool everyOk = true;
    const auto answerLine = [&everyOk](std::string_view request) {
        const forwright::contract::Answer answer = forwright::contract::answer(request);
        everyOk = everyOk && answer.ok;
        std::fwrite(answer.text.data(), 1, answer.text.size(), stdout);
        std::fputc('\n', stdout);
    };

    LineReader lines;
    static std::array<char, 1 << 16> buffer;
    while (true) {
        if (std::fflush(stdout) != 0) {
            std::fprintf(stderr, "forwright: cannot write: %s\n", std::strerror(errno));
            return unusable;
        }
        const ssize_t count = ::read(STDIN_FILENO, buffer.data(), buffer.size());
        if (count > 0) {
            lines.feed(std::string_view{buffer.data(), static_cast<std::size_t>(count)}, answerLine);
        } else if (count == 0) {
            break;
        } else if (errno != EINTR) {
            std::fprintf(stderr, "forwright: cannot read: %s\n", std::strerror(errno));
            return unusable;
        }
    }
    lines.close(answerLine);
    if (std::fflush(stdout) != 0 || std::ferror(stdout) != 0) {
        std::fprintf(stderr, "forwright: cannot write: %s\n", std::strerror(errno));
        return unusable;
    }
    return everyOk ? everyAnswerOk : someAnswerNotOk;
}

int print(std::string_view text) {
    std::fwrite(text.data(), 1, text.size(), stdout);
    return std::fflush(stdout) == 0 ? everyAnswerOk : unusable;
}

} // namespace

int main(int count, char** arguments) {
    if (count == 1) {
        return answerStandardInput();
    }
    const std::string_view argument = arguments[1];
    if (count == 2 && argument == "--help") {
        return print(help);
    }
    if (count == 2 && argument == "--version") {
        return print("forwright " + std::string{forwright::contract::version()} + "\n");
    }
    if (count == 2 && argument == "--schema") {
        return print(std::string{forwright::contract::schema()} + "\n");
    }
    const std::string_view unknown = arguments[count == 2 ? 1 : 2];
    std::fprintf(stderr, "forwright: cannot use the argument '%s'; forwright --help says what it takes\n",
                 std::string{unknown}.c_str());
    return unusable;
}
