#include "geo/project/database.h"

#include <cmath>
#include <utility>

#include <sqlite3.h>

#include "geo/project/geometry_blob.h"

namespace unstring {
namespace {

Fault sqlite_fault(const std::string& path, int code, const std::string& message) {
    Fault fault;
    fault.file = path;
    fault.found = message;
    switch (code & 0xff) {
    case SQLITE_BUSY:
    case SQLITE_LOCKED:
        fault.code = FaultCode::file_busy;
        fault.remedy = "Another program is writing this file; close it there and try again";
        break;
    case SQLITE_FULL:
    case SQLITE_IOERR:
    case SQLITE_READONLY:
    case SQLITE_PERM:
        fault.code = FaultCode::write_failed;
        fault.remedy = "Make room on the disk or give permission to write; the file is as it was";
        break;
    case SQLITE_CANTOPEN:
        fault.code = FaultCode::file_missing;
        fault.remedy = "Check the path and the permissions of the folder";
        break;
    default:
        fault.code = FaultCode::file_broken;
        fault.wanted = "an Unstring project";
        fault.remedy = "Take a copy that opens, or gather the files again into a new project";
    }
    return fault;
}

constexpr int kIsEmpty = 4;
int function_numbers[] = {0, 1, 2, 3, kIsEmpty}; // SQLite hands back the address

// GeoPackage's R-tree triggers call these; a box of nothing is null.
void envelope_function(sqlite3_context* context, int, sqlite3_value** values) {
    const auto* data = static_cast<const unsigned char*>(sqlite3_value_blob(values[0]));
    const auto size = static_cast<std::size_t>(sqlite3_value_bytes(values[0]));
    const auto box = geometry_envelope({data, data == nullptr ? 0 : size});
    const int which = *static_cast<const int*>(sqlite3_user_data(context));
    if (which == kIsEmpty) return sqlite3_result_int(context, box ? 0 : 1);
    if (!box) return sqlite3_result_null(context);
    const double sides[] = {box->low.x_m, box->high.x_m, box->low.y_m, box->high.y_m};
    sqlite3_result_double(context, sides[which]);
}

void add_functions(sqlite3* handle) {
    const char* names[] = {"ST_MinX", "ST_MaxX", "ST_MinY", "ST_MaxY", "ST_IsEmpty"};
    for (std::size_t i = 0; i < 5; ++i)
        sqlite3_create_function(handle, names[i], 1, SQLITE_UTF8 | SQLITE_DETERMINISTIC | SQLITE_INNOCUOUS,
                                &function_numbers[i], envelope_function, nullptr, nullptr);
}

} // namespace

Statement::Statement(Statement&& other) noexcept
    : database_(other.database_), handle_(std::exchange(other.handle_, nullptr)) {}

Statement::~Statement() { sqlite3_finalize(handle_); }

Statement& Statement::bind(int place, std::int64_t value) {
    if (handle_ != nullptr) sqlite3_bind_int64(handle_, place, value);
    return *this;
}

Statement& Statement::bind(int place, double value) {
    if (handle_ != nullptr && !std::isnan(value)) sqlite3_bind_double(handle_, place, value);
    return *this;
}

Statement& Statement::bind(int place, std::string_view value) {
    if (handle_ != nullptr)
        sqlite3_bind_text64(handle_, place, value.data() == nullptr ? "" : value.data(), value.size(),
                            SQLITE_TRANSIENT, SQLITE_UTF8);
    return *this;
}

Statement& Statement::bind(int place, const Bytes& value) {
    if (handle_ != nullptr && !value.empty())
        sqlite3_bind_blob64(handle_, place, value.data(), value.size(), SQLITE_TRANSIENT);
    return *this;
}

Statement& Statement::bind(int place, const CellValue& value) {
    if (const auto* integer = std::get_if<std::int64_t>(&value)) return bind(place, *integer);
    if (const auto* real = std::get_if<double>(&value)) return bind(place, *real);
    if (const auto* text = std::get_if<std::string>(&value)) return bind(place, std::string_view(*text));
    return *this;
}

bool Statement::step() {
    if (handle_ == nullptr || database_.is_failed()) return false;
    const int code = sqlite3_step(handle_);
    if (code == SQLITE_ROW) return true;
    if (code != SQLITE_DONE) database_.note_failure(code);
    return false;
}

void Statement::run() {
    while (step()) {
    }
    if (handle_ == nullptr) return;
    sqlite3_reset(handle_);
    sqlite3_clear_bindings(handle_);
}

std::int64_t Statement::integer(int column) const { return sqlite3_column_int64(handle_, column); }
double Statement::real(int column) const { return sqlite3_column_double(handle_, column); }

std::string Statement::text(int column) const {
    const auto* data = reinterpret_cast<const char*>(sqlite3_column_text(handle_, column));
    return data == nullptr
               ? std::string()
               : std::string(data, static_cast<std::size_t>(sqlite3_column_bytes(handle_, column)));
}

Bytes Statement::bytes(int column) const {
    const auto* data = static_cast<const unsigned char*>(sqlite3_column_blob(handle_, column));
    return data == nullptr ? Bytes() : Bytes(data, data + sqlite3_column_bytes(handle_, column));
}

CellValue Statement::cell(int column) const {
    switch (sqlite3_column_type(handle_, column)) {
    case SQLITE_INTEGER:
        return integer(column);
    case SQLITE_FLOAT:
        return real(column);
    case SQLITE_TEXT:
        return text(column);
    default:
        return {};
    }
}

bool Statement::is_null(int column) const { return sqlite3_column_type(handle_, column) == SQLITE_NULL; }
int Statement::columns() const { return handle_ == nullptr ? 0 : sqlite3_column_count(handle_); }
std::string Statement::column_name(int column) const { return sqlite3_column_name(handle_, column); }

Expected<std::unique_ptr<Database>> Database::open(const std::string& path, Access access) {
    int flags = SQLITE_OPEN_READONLY;
    if (access == Access::write) flags = SQLITE_OPEN_READWRITE;
    if (access == Access::create) flags = SQLITE_OPEN_READWRITE | SQLITE_OPEN_CREATE;
    sqlite3* handle = nullptr;
    const int code = sqlite3_open_v2(path.c_str(), &handle, flags | SQLITE_OPEN_NOMUTEX, nullptr);
    std::unique_ptr<Database> database(new Database(path, handle));
    if (code != SQLITE_OK) {
        database->note_failure(code);
        return tl::make_unexpected(*database->failure());
    }
    sqlite3_extended_result_codes(handle, 1);
    sqlite3_busy_timeout(handle, 5000);
    sqlite3_db_config(handle, SQLITE_DBCONFIG_DEFENSIVE, 1, nullptr);
    sqlite3_db_config(handle, SQLITE_DBCONFIG_TRUSTED_SCHEMA, 0, nullptr);
    sqlite3_db_config(handle, SQLITE_DBCONFIG_ENABLE_LOAD_EXTENSION, 0, nullptr);
    add_functions(handle);
    if (access != Access::read) {
        database->run("PRAGMA journal_mode=WAL");
        database->run("PRAGMA synchronous=FULL");
    }
    database->run("PRAGMA foreign_keys=ON");
    (void)database->integer(
        "SELECT count(*) FROM sqlite_master"); // shows now whether it is a database at all
    if (database->failure()) return tl::make_unexpected(*database->failure());
    return database;
}

Database::~Database() { sqlite3_close_v2(handle_); }

void Database::note_failure(int code) {
    if (!failure_) failure_ = sqlite_fault(path_, code, sqlite3_errmsg(handle_));
}

void Database::fail(Fault fault) {
    if (!failure_) failure_ = std::move(fault);
}

void Database::run(const std::string& sql) {
    if (is_failed()) return;
    const int code = sqlite3_exec(handle_, sql.c_str(), nullptr, nullptr, nullptr);
    if (code != SQLITE_OK) note_failure(code);
}

Statement Database::prepare(const std::string& sql) {
    sqlite3_stmt* handle = nullptr;
    if (!is_failed()) {
        const int code = sqlite3_prepare_v2(handle_, sql.c_str(), -1, &handle, nullptr);
        if (code != SQLITE_OK) note_failure(code);
    }
    return {*this, handle};
}

std::optional<std::int64_t> Database::integer(const std::string& sql) {
    Statement statement = prepare(sql);
    if (!statement.step() || statement.is_null(0)) return std::nullopt;
    return statement.integer(0);
}

std::optional<std::string> Database::text(const std::string& sql) {
    Statement statement = prepare(sql);
    if (!statement.step() || statement.is_null(0)) return std::nullopt;
    return statement.text(0);
}

bool Database::has_table(std::string_view name) {
    Statement statement = prepare("SELECT 1 FROM sqlite_master WHERE type='table' AND name=?1");
    statement.bind(1, name);
    return statement.step();
}

std::int64_t Database::last_id() const { return sqlite3_last_insert_rowid(handle_); }

Expected<void> Database::transaction(const std::function<void()>& work) {
    run("BEGIN IMMEDIATE");
    if (!is_failed()) work();
    if (!is_failed()) run("COMMIT");
    if (!is_failed()) return {};
    if (sqlite3_get_autocommit(handle_) == 0) sqlite3_exec(handle_, "ROLLBACK", nullptr, nullptr, nullptr);
    Fault fault = *failure_;
    failure_.reset(); // the file is as it was: the next call may try again
    return tl::make_unexpected(std::move(fault));
}

void Database::trust_schema() { sqlite3_db_config(handle_, SQLITE_DBCONFIG_TRUSTED_SCHEMA, 1, nullptr); }

void Database::close_to_one_file() {
    sqlite3_exec(handle_, "PRAGMA wal_checkpoint(TRUNCATE)", nullptr, nullptr, nullptr);
    sqlite3_exec(handle_, "PRAGMA journal_mode=DELETE", nullptr, nullptr, nullptr);
}

Expected<void> Database::copy_to(const std::string& path) {
    Statement statement = prepare("VACUUM INTO ?1");
    statement.bind(1, std::string_view(path));
    statement.run();
    if (!is_failed()) return {};
    Fault fault = *failure_;
    failure_.reset();
    return tl::make_unexpected(std::move(fault));
}

} // namespace unstring
