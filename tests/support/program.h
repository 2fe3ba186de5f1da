#pragma once
// Runs the built program as a user's script would.

#include <chrono>
#include <cstdio>
#include <cstdlib>
#include <fstream>
#include <iterator>
#include <string>
#include <vector>

#include <fcntl.h>
#include <signal.h>
#include <spawn.h>
#include <sys/wait.h>
#include <unistd.h>

#include <nlohmann/json.hpp>

#include "tests/support/temp_folder.h"

extern char** environ;

namespace unstring::tests {

struct Ran {
    int status = -1; ///< exit status; 128 + signal when it was killed
    std::string out, err;
    [[nodiscard]] nlohmann::json json() const { return nlohmann::json::parse(out); }
};

/// @param kill_after  no limit when zero; else SIGKILL after that time
inline Ran run_file(const std::string& file, std::vector<std::string> arguments,
                    std::chrono::microseconds kill_after = {}) {
    const TempFolder folder;
    const std::string out = folder.file("out"), err = folder.file("err");
    arguments.insert(arguments.begin(), file);
    std::vector<char*> argv;
    for (std::string& argument : arguments) argv.push_back(argument.data());
    argv.push_back(nullptr);
    posix_spawn_file_actions_t files;
    posix_spawn_file_actions_init(&files);
    posix_spawn_file_actions_addopen(&files, 0, "/dev/null", O_RDONLY, 0);
    posix_spawn_file_actions_addopen(&files, 1, out.c_str(), O_WRONLY | O_CREAT, 0600);
    posix_spawn_file_actions_addopen(&files, 2, err.c_str(), O_WRONLY | O_CREAT, 0600);
    pid_t child = 0;
    const int failed = posix_spawn(&child, file.c_str(), &files, nullptr, argv.data(), environ);
    posix_spawn_file_actions_destroy(&files);
    if (failed != 0) return {};
    if (kill_after.count() > 0) {
        usleep(static_cast<useconds_t>(kill_after.count()));
        kill(child, SIGKILL);
    }
    int status = 0;
    waitpid(child, &status, 0);
    const auto text = [](const std::string& path) {
        std::ifstream stream(path, std::ios::binary);
        return std::string{std::istreambuf_iterator<char>(stream), std::istreambuf_iterator<char>()};
    };
    return {WIFEXITED(status) ? WEXITSTATUS(status) : 128 + WTERMSIG(status), text(out), text(err)};
}

inline Ran run_program(std::vector<std::string> arguments, std::chrono::microseconds kill_after = {}) {
    return run_file(UNSTRING_PROGRAM, std::move(arguments), kill_after);
}

/// The options of gather for a folder of city files in our own names.
inline std::vector<std::string> gather_arguments(const std::string& project, const std::string& city) {
    std::vector<std::string> arguments = {"gather", project, "--json"};
    const std::pair<const char*, const char*> files[] = {{"--poles", "poles.csv"},
                                                         {"--circuits", "circuits.csv"},
                                                         {"--transformers", "transformers.csv"},
                                                         {"--services", "services.csv"},
                                                         {"--streets", "streets.gpkg"},
                                                         {"--canopy", "canopy.tif"},
                                                         {"--obstacles", "buildings.gpkg"},
                                                         {"--climate", "climate.csv"},
                                                         {"--prices", "prices.csv"},
                                                         {"--budget", "budget.csv"},
                                                         {"--cutbacks", "cutbacks.csv"},
                                                         {"--marks", "marks.csv"}};
    for (const auto& [option, name] : files) {
        const std::string path = city + "/" + name;
        if (!std::filesystem::exists(path)) continue;
        arguments.push_back(option);
        arguments.push_back(path);
    }
    return arguments;
}

} // namespace unstring::tests
