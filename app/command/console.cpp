#include "app/command/console.h"

#include <atomic>
#include <csignal>
#include <cstdio>
#include <memory>

#include <unistd.h>

#include <fmt/format.h>

namespace unstring {
namespace {

std::atomic<bool> is_stop_asked{false};
static_assert(std::atomic<bool>::is_always_lock_free);

extern "C" void ask_to_stop(int) { is_stop_asked.store(true, std::memory_order_relaxed); }

// Bytes that are no UTF-8 (a file name, a field) must not stop the answer.
std::string dumped(const nlohmann::ordered_json& json) {
    return json.dump(1, ' ', false, nlohmann::ordered_json::error_handler_t::replace);
}

} // namespace

void Console::say(const std::string& text) const {
    std::FILE* to = is_json_ ? stderr : stdout;
    std::fwrite(text.data(), 1, text.size(), to);
    std::fputc('\n', to);
}

void Console::answer(const nlohmann::ordered_json& json) const {
    if (!is_json_) return;
    const std::string text = dumped(json);
    std::fwrite(text.data(), 1, text.size(), stdout);
    std::fputc('\n', stdout);
}

int Console::fail(const Fault& fault) const {
    std::fflush(stdout);
    const std::string text = "unstring: " + fault_text(fault) + "\n";
    std::fwrite(text.data(), 1, text.size(), stderr);
    answer({{"fault",
             {{"code", fault_code_text(fault.code)},
              {"file", fault.file},
              {"row", fault.row},
              {"field", fault.field},
              {"found", fault.found},
              {"wanted", fault.wanted},
              {"remedy", fault.remedy}}}});
    return fault_exit_code(fault.code);
}

Progress Console::progress(std::string what) const {
    std::signal(SIGINT, ask_to_stop);
    std::signal(SIGTERM, ask_to_stop);
    Progress progress;
    progress.cancel = &is_stop_asked;
    if (isatty(STDERR_FILENO) == 0) return progress;
    auto last = std::make_shared<std::atomic<int>>(-1);
    progress.on_progress = [what = std::move(what), last](double done_frac) {
        const int percent = static_cast<int>(done_frac * 100);
        if (last->exchange(percent) == percent) return;
        fmt::print(stderr, "\r{} {} %{}", what, percent, percent >= 100 ? "\n" : "");
        std::fflush(stderr);
    };
    return progress;
}

} // namespace unstring
