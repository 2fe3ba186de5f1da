#include "geo/project/lock.h"

#include <cerrno>
#include <cstring>
#include <ctime>

#include <fcntl.h>
#include <pwd.h>
#include <sys/file.h>
#include <sys/stat.h>
#include <unistd.h>

#include <fmt/format.h>

namespace unstring {
namespace {

std::string host_name() {
    char name[256] = {};
    return gethostname(name, sizeof name - 1) == 0 ? name : "this machine";
}

std::string holder_of(int file) {
    char text[512] = {};
    const ssize_t size = pread(file, text, sizeof text - 1, 0);
    std::string holder(text, size > 0 ? static_cast<std::size_t>(size) : 0);
    while (!holder.empty() && holder.back() == '\n') holder.pop_back();
    return holder.empty() ? "another process" : holder;
}

// The file behind the name may have been unlinked by its last holder between open and lock.
bool is_still_named(int file, const std::string& path) {
    struct stat held {
    }, named{};
    return fstat(file, &held) == 0 && stat(path.c_str(), &named) == 0 && held.st_ino == named.st_ino &&
           held.st_dev == named.st_dev;
}

} // namespace

Expected<std::unique_ptr<WriterLock>> WriterLock::take(const std::string& project_path) {
    const std::string path = project_path + ".lock";
    for (int round = 0; round < 16; ++round) {
        const int file = ::open(path.c_str(), O_RDWR | O_CREAT | O_CLOEXEC, 0664);
        if (file < 0)
            return tl::make_unexpected(Fault{
                FaultCode::write_failed, path, 0, "", std::strerror(errno), "a folder that can be written",
                "Give permission to write in the folder, or open the project read-only"});
        if (flock(file, LOCK_EX | LOCK_NB) != 0) {
            const std::string holder = holder_of(file);
            ::close(file);
            return tl::make_unexpected(Fault{FaultCode::file_busy, project_path, 0, "",
                                             "written by " + holder, "no other writer",
                                             "Close it there, or look at it read-only meanwhile"});
        }
        if (!is_still_named(file, path)) {
            ::close(file);
            continue;
        }
        const std::string text = fmt::format("{} on {} since {}\n", user_name(), host_name(), now_text());
        if (ftruncate(file, 0) != 0 || pwrite(file, text.data(), text.size(), 0) < 0) {
            ::close(file);
            return tl::make_unexpected(Fault{FaultCode::write_failed, path, 0, "", std::strerror(errno), "",
                                             "Make room on the disk"});
        }
        return std::unique_ptr<WriterLock>(new WriterLock(file, path));
    }
    return tl::make_unexpected(
        Fault{FaultCode::file_busy, project_path, 0, "", "a lock that changes hands", "", "Try again"});
}

WriterLock::~WriterLock() {
    ::unlink(path_.c_str());
    ::close(file_);
}

std::string user_name() {
    for (const char* variable : {"UNSTRING_USER", "USER", "LOGNAME"})
        if (const char* name = std::getenv(variable); name != nullptr && *name != '\0') return name;
    const passwd* entry = getpwuid(getuid());
    return entry != nullptr ? entry->pw_name : "unknown";
}

std::string now_text() {
    const std::time_t now = std::time(nullptr);
    std::tm local{};
    localtime_r(&now, &local);
    char text[32];
    std::strftime(text, sizeof text, "%Y-%m-%dT%H:%M:%S", &local);
    return text;
}

} // namespace unstring
