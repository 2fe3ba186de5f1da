#pragma once
// The only place that speaks to SQLite. A database remembers its first failure: after it every call does
// nothing, so that a long run of writes is checked once, at its transaction.

#include <cstdint>
#include <functional>
#include <memory>
#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

#include "model/fault.h"
#include "model/plan/change.h"

struct sqlite3;
struct sqlite3_stmt;

namespace unstring {

using Bytes = std::vector<unsigned char>;

class Database;

class Statement {
public:
    Statement(Statement&& other) noexcept;
    Statement& operator=(Statement&&) = delete;
    ~Statement();

    /// Parameters count from 1.
    Statement& bind(int place, std::int64_t value);
    Statement& bind(int place, double value); ///< NaN is stored as null
    Statement& bind(int place, std::string_view value);
    Statement& bind(int place, const Bytes& value); ///< empty = null
    Statement& bind(int place, const CellValue& value);
    /// Runs to the next row; false at the end or after a failure.
    bool step();
    /// Runs to the end and makes ready for the next binding.
    void run();
    /// Columns count from 0.
    [[nodiscard]] std::int64_t integer(int column) const;
    [[nodiscard]] double real(int column) const;
    [[nodiscard]] std::string text(int column) const;
    [[nodiscard]] Bytes bytes(int column) const;
    [[nodiscard]] CellValue cell(int column) const;
    [[nodiscard]] bool is_null(int column) const;
    [[nodiscard]] int columns() const;
    [[nodiscard]] std::string column_name(int column) const;

private:
    friend class Database;
    Statement(Database& database, sqlite3_stmt* handle) : database_(database), handle_(handle) {}
    Database& database_;
    sqlite3_stmt* handle_ = nullptr;
};

class Database {
public:
    enum class Access { read, write, create };

    /// WAL, full synchronisation and foreign keys are on for writers; a schema's own functions are not
    /// trusted.
    /// @fault file_missing, file_broken, write_failed
    static Expected<std::unique_ptr<Database>> open(const std::string& path, Access access);
    ~Database();
    Database(const Database&) = delete;
    Database& operator=(const Database&) = delete;

    void run(const std::string& sql);
    [[nodiscard]] Statement prepare(const std::string& sql);
    /// First column of the first row; nothing when there is no row.
    [[nodiscard]] std::optional<std::int64_t> integer(const std::string& sql);
    [[nodiscard]] std::optional<std::string> text(const std::string& sql);
    [[nodiscard]] bool has_table(std::string_view name);
    [[nodiscard]] std::int64_t last_id() const;

    /// Everything that `work` writes, or nothing of it.
    Expected<void> transaction(const std::function<void()>& work);
    /// From here on triggers may write the R-trees: only for a schema that check_schema found to be ours.
    void trust_schema();
    /// Folds the journal in, so that the closed file is one file.
    void close_to_one_file();
    /// Keeps `path` as a whole copy of this database as it stands.
    Expected<void> copy_to(const std::string& path);

    [[nodiscard]] bool is_failed() const { return failure_.has_value(); }
    [[nodiscard]] const std::optional<Fault>& failure() const { return failure_; }
    /// Remembers a failure of the caller's own, so that the transaction is undone.
    void fail(Fault fault);

private:
    friend class Statement;
    Database(std::string path, sqlite3* handle) : path_(std::move(path)), handle_(handle) {}
    void note_failure(int code);
    std::string path_;
    sqlite3* handle_ = nullptr;
    std::optional<Fault> failure_;
};

} // namespace unstring
