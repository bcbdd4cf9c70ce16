#include "contract/answer.hpp"

#include "contract/findings.hpp"
#include "contract/reader.hpp"
#include "contract/result_writer.hpp"
#include "contract/task.hpp"
#include "contract/writer.hpp"

#include <utility>

namespace forwright::contract {

namespace {

constexpr std::string_view format = "forwright/1";

void writeRemarks(Writer& writer, std::string_view name, const std::vector<outcome::Remark>& remarks) {
    writeList(writer, name, remarks, [&](const outcome::Remark& remark) {
        writer.beginObject();
        writer.member("at", remark.at);
        writer.member("code", remark.code);
        writer.member("message", remark.message);
        writer.endObject();
    });
}

void beginAnswer(Writer& writer, const Task* task, bool ok) {
    writer.beginObject();
    writer.member("format", format);
    if (task != nullptr) {
        writer.member("task", task->name);
    }
    writer.member("ok", ok);
}

Answer refusal(const Task* task, const outcome::Faults& faults) {
    Writer writer;
    beginAnswer(writer, task, false);
    writeRemarks(writer, "errors", faults);
    writer.endObject();
    return {writer.take(), false};
}

void endResult(Writer& writer, const Findings& findings) {
    writeRemarks(writer, "notices", findings.allNotices());
    writeList(writer, "assumed", findings.assumptions(), [&](const Assumption& assumption) {
        writer.beginObject();
        writer.member("at", assumption.at);
        writer.key("value").raw(assumption.json);
        writer.endObject();
    });
    writer.endObject();
}

void readFormat(Reader& request) {
    const Value value = request.required("format", "the contract that is spoken, " + quotedText(format));
    const std::optional<std::string_view> name = value.text();
    if (name && *name != format) {
        value.fault("unknown-format",
                    shownText(*name) + " is not spoken here: give " + quotedText(format) + ".");
    }
}

const Task* readTask(Reader& request) {
    const Value value = request.required("task", "what is asked for, as in \"quote\"");
    const std::optional<std::string_view> name = value.text();
    if (!name) {
        return nullptr;
    }
    std::vector<std::string_view> names;
    for (const Task& task : tasks()) {
        if (task.name == *name) {
            return &task;
        }
        names.push_back(task.name);
    }
    value.fault("unknown-task", shownText(*name) + " is no task: give " + listedText(names) + ".");
    return nullptr;
}

/// The calculation that is asked for, once every member is read; empty where something is at fault.
Calculation read(const Json& root, Findings& findings, const Task*& task) {
    Reader request{Value{root, Place{}, findings}};
    readFormat(request);
    task = readTask(request);
    if (task == nullptr) {
        request.passOver();
        return {};
    }
    return task->read(request);
}

/// Every figure is checked where it is calculated; this is the last line, so that no answer holds a null in
/// place of a number.
outcome::Fault notFinite(const std::string& name) {
    return {"", "not-finite",
            "The figure " + quotedText(name) +
                " of the result is too large to be a number; with inputs this extreme there is no answer."};
}

} // namespace

Answer answer(std::string_view request) {
    outcome::Outcome<Parsed> parsed = parse(request);
    if (!parsed) {
        return refusal(nullptr, parsed.faults());
    }
    Findings findings;
    findings.faults(Place{}, parsed.value().duplicates);
    const Task* task = nullptr;
    const Calculation calculate = read(parsed.value().document.root(), findings, task);
    if (!findings.ok()) {
        return refusal(task, findings.allFaults());
    }
    Writer writer;
    beginAnswer(writer, task, true);
    writer.key("result");
    calculate(findings, writer);
    if (!findings.ok()) {
        return refusal(task, findings.allFaults());
    }
    if (!writer.notFinite().empty()) {
        return refusal(task, {notFinite(writer.notFinite())});
    }
    endResult(writer, findings);
    return {writer.take(), true};
}

} // namespace forwright::contract
