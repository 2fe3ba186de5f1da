#pragma once
// Who may write: a lock that the operating system holds on PROJECT.lock, so that a dead holder's lock is
// free.

#include <memory>
#include <string>

#include "model/fault.h"

namespace unstring {

class WriterLock {
public:
    /// Takes the lock and writes into it who holds it. @fault file_busy (found: user, host and since),
    /// write_failed
    static Expected<std::unique_ptr<WriterLock>> take(const std::string& project_path);
    ~WriterLock();
    WriterLock(const WriterLock&) = delete;
    WriterLock& operator=(const WriterLock&) = delete;

private:
    WriterLock(int file, std::string path) : file_(file), path_(std::move(path)) {}
    int file_;
    std::string path_;
};

/// The name that edits and locks carry: the user's, from the environment or the operating system.
[[nodiscard]] std::string user_name();
/// Local time, ISO 8601 to the second.
[[nodiscard]] std::string now_text();

} // namespace unstring
