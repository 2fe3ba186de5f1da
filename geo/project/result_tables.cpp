#include "geo/project/result_tables.h"

#include <cstring>

#include <fmt/format.h>

#include "geo/project/geometry_blob.h"
#include "geo/project/lock.h"
#include "geo/project/result_json.h"
#include "geo/project/schema.h"

namespace unstring {
namespace {

using nlohmann::json;

Bytes floats_blob(const std::vector<float>& values) {
    Bytes bytes(values.size() * sizeof(float));
    if (!values.empty()) std::memcpy(bytes.data(), values.data(), bytes.size());
    return bytes;
}

std::vector<float> floats_of(const Bytes& bytes) {
    std::vector<float> values(bytes.size() / sizeof(float));
    if (!values.empty()) std::memcpy(values.data(), bytes.data(), values.size() * sizeof(float));
    return values;
}

std::string dumped(const json& value) { return value.dump(-1, ' ', false, json::error_handler_t::replace); }

std::optional<json> run_json(Database& database, Step step, const std::string& plan) {
    Statement select = database.prepare("SELECT result_json FROM step_runs WHERE step=?1 AND plan=?2");
    select.bind(1, std::string_view(text_of(step))).bind(2, std::string_view(plan));
    if (!select.step() || select.text(0).empty()) return std::nullopt;
    return json::parse(select.text(0), nullptr, false);
}

// A result that does not fit its records (made by another version, or mended by hand) counts as not there:
// the step runs again.
template <class Read>
auto guarded(Read read) -> std::optional<decltype(read())> {
    try {
        return read();
    } catch (const json::exception&) {
        return std::nullopt;
    }
}

template <class Tag>
bool fits(Index<Tag> index, std::size_t size) {
    return !index.is_valid() || index.place() < size;
}

bool fit(const City& city, const std::vector<PoleIx>& poles) {
    for (PoleIx pole : poles)
        if (!pole.is_valid() || pole.place() >= city.poles.size()) return false;
    return true;
}

bool fit(const City& city, const CircuitSpan& span) {
    const std::size_t poles = city.poles.size();
    return fits(span.pole, poles) && fits(span.duct_from, poles) && fits(span.duct_to, poles) &&
           fits(span.service, city.services.size()) && fits(span.duct_string, city.strings.size()) &&
           fit(city, span.poles_beyond);
}

bool fit(const City& city, const DecideResult& result) {
    for (const PoleDecision& decision : result.poles)
        if (!fit(city, std::vector<PoleIx>{decision.pole})) return false;
    for (const CircuitSpan& span : result.spans)
        if (!fit(city, span)) return false;
    for (const Circuit& circuit : result.circuits)
        if (!fits(circuit.service, city.services.size()) || !fit(city, circuit.poles)) return false;
    for (const auto& refused : result.marks_refused)
        if (!fit(city, std::vector<PoleIx>{refused.pole})) return false;
    return true;
}

json summary_of(const DecideResult& r) {
    return {{"keep", r.keep},
            {"rewire", r.rewire},
            {"solar", r.solar},
            {"services_new", r.services_new},
            {"marks_followed", r.marks_followed},
            {"marks_refused", r.marks_refused},
            {"cost", r.cost},
            {"bound", r.bound},
            {"feasible", r.feasible},
            {"trench_m", r.trench_m},
            {"all_rewire_cost", r.all_rewire_cost},
            {"all_solar_cost", r.all_solar_cost},
            {"greedy_cost", r.greedy_cost},
            {"all_rewire_not_possible", r.all_rewire_not_possible},
            {"all_solar_not_possible", r.all_solar_not_possible},
            {"limits_price", r.limits_price},
            {"seconds", r.seconds},
            {"circuits", r.circuits},
            {"spans", r.spans}};
}

DecideResult decide_of(const json& j) {
    DecideResult r;
    r.keep = j.at("keep");
    r.rewire = j.at("rewire");
    r.solar = j.at("solar");
    r.services_new = j.at("services_new");
    r.marks_followed = j.at("marks_followed");
    r.marks_refused = j.at("marks_refused").get<std::vector<DecideResult::Refused>>();
    r.cost = j.at("cost");
    r.bound = j.at("bound");
    r.feasible = j.at("feasible");
    r.trench_m = j.at("trench_m");
    r.all_rewire_cost = j.at("all_rewire_cost");
    r.all_solar_cost = j.at("all_solar_cost");
    r.greedy_cost = j.at("greedy_cost");
    r.all_rewire_not_possible = j.at("all_rewire_not_possible");
    r.all_solar_not_possible = j.at("all_solar_not_possible");
    r.limits_price = j.at("limits_price");
    r.seconds = j.at("seconds");
    r.circuits = j.at("circuits").get<std::vector<Circuit>>();
    r.spans = j.at("spans").get<std::vector<CircuitSpan>>();
    return r;
}

// For other programs: the spans as lines on the map.
void write_span_layer(Database& database, const City& city, const std::string& plan,
                      const DecideResult& result) {
    make_layer(database, {"circuit_spans", "LINESTRING",
                          "plan TEXT, span INTEGER, parent INTEGER, kind TEXT, service_id TEXT, pole_id "
                          "TEXT, length_m REAL, awg INTEGER, cost REAL",
                          "Spans of the new lighting circuits"});
    Statement insert =
        database.prepare("INSERT INTO circuit_spans VALUES (NULL,?1,?2,?3,?4,?5,?6,?7,?8,?9,?10)");
    const int srs_id = srs_id_of(database);
    for (const CircuitSpan& span : result.spans) {
        insert.bind(1, line_blob(span.line, srs_id))
            .bind(2, std::string_view(plan))
            .bind(3, std::int64_t{span.id});
        insert.bind(4, std::int64_t{span.parent})
            .bind(5, std::string_view(json(span.kind).get<std::string>()));
        if (span.service.is_valid()) insert.bind(6, std::string_view(city.services[span.service.place()].id));
        if (span.pole.is_valid()) insert.bind(7, std::string_view(city.poles[span.pole.place()].id));
        insert.bind(8, span.length_m).bind(9, std::int64_t{span.awg}).bind(10, to_dollars(span.cost));
        insert.run();
    }
    finish_layer(database, "circuit_spans");
}

} // namespace

std::optional<StepRun> step_run(Database& database, Step step, const std::string& plan) {
    Statement select = database.prepare("SELECT input_hash, at FROM step_runs WHERE step=?1 AND plan=?2");
    select.bind(1, std::string_view(text_of(step))).bind(2, std::string_view(plan));
    if (!select.step()) return std::nullopt;
    return StepRun{select.text(0), select.text(1)};
}

void forget_results(Database& database) {
    database.run("UPDATE step_runs SET result_json='' WHERE step<>'gather'; DELETE FROM pole_skies; DELETE "
                 "FROM pole_decisions;"
                 "DELETE FROM findings WHERE step<>'gather'");
}

void write_step_run(Database& database, Step step, const std::string& plan, const std::string& hash,
                    const std::string& result_json) {
    Statement insert = database.prepare("INSERT OR REPLACE INTO step_runs VALUES (?1,?2,?3,?4,?5)");
    insert.bind(1, std::string_view(text_of(step)))
        .bind(2, std::string_view(plan))
        .bind(3, std::string_view(hash));
    insert.bind(4, std::string_view(now_text())).bind(5, std::string_view(result_json)).run();
}

void write_findings(Database& database, Step step, const std::string& plan,
                    const std::vector<Finding>& findings) {
    Statement remove = database.prepare("DELETE FROM findings WHERE step=?1 AND plan=?2");
    remove.bind(1, std::string_view(text_of(step))).bind(2, std::string_view(plan)).run();
    Statement insert =
        database.prepare("INSERT INTO findings VALUES (NULL,?1,?2,?3,?4,?5,?6,?7,?8,?9,?10,?11)");
    for (const Finding& f : findings) {
        insert.bind(1, std::string_view(text_of(step)))
            .bind(2, std::string_view(plan))
            .bind(3, std::string_view(f.code));
        insert.bind(4, std::string_view(severity_text(f.severity)))
            .bind(5, std::string_view(f.file))
            .bind(6, std::int64_t{f.row});
        insert.bind(7, std::string_view(f.record))
            .bind(8, std::string_view(f.found))
            .bind(9, std::string_view(f.wanted));
        insert.bind(10, std::string_view(f.remedy)).bind(11, std::string_view(f.table)).run();
    }
}

std::vector<Finding> read_findings(Database& database, Step step, const std::string& plan) {
    Statement select = database.prepare("SELECT code, severity, file, row, record, found, wanted, remedy, "
                                        "record_table FROM findings WHERE step=?1 AND plan=?2 ORDER BY id");
    select.bind(1, std::string_view(text_of(step))).bind(2, std::string_view(plan));
    std::vector<Finding> findings;
    while (select.step()) {
        const std::string severity = select.text(1);
        findings.push_back({select.text(0),
                            severity == "error"    ? Severity::error
                            : severity == "notice" ? Severity::notice
                                                   : Severity::warning,
                            select.text(2), static_cast<long>(select.integer(3)), select.text(4),
                            select.text(5), select.text(6), select.text(7), select.text(8)});
    }
    return findings;
}

void write_vet(Database& database, const City&, const VetResult& result, const std::string& hash) {
    write_step_run(database, Step::vet, "", hash, dumped(json{{"strings", result.strings}}));
    write_findings(database, Step::vet, "", result.findings);
}

std::optional<VetResult> read_vet(Database& database, const City& city) {
    const auto stored = run_json(database, Step::vet, "");
    if (!stored) return std::nullopt;
    auto result = guarded([&] {
        return VetResult{read_findings(database, Step::vet, ""),
                         stored->at("strings").get<std::vector<VetString>>()};
    });
    if (!result) return std::nullopt;
    for (const VetString& string : result->strings)
        if (!string.string.is_valid() || string.string.place() >= city.strings.size() ||
            !fits(string.transformer, city.transformers.size()) || !fit(city, string.wiring))
            return std::nullopt;
    return result;
}

void write_shade(Database& database, const City& city, const ShadeResult& result,
                 const std::vector<Finding>& findings, const std::string& hash) {
    write_step_run(database, Step::shade, "", hash, dumped(json{{"seconds", result.seconds}}));
    write_findings(database, Step::shade, "", findings);
    database.run("DELETE FROM pole_skies");
    Statement insert = database.prepare("INSERT INTO pole_skies VALUES (?1,?2,?3,?4,?5,?6)");
    for (const PoleShade& sky : result.poles) {
        const json row = {{"best", sky.best},
                          {"panel_height_m", sky.panel_height_m},
                          {"bearing_deg", sky.bearing_deg},
                          {"bearing_from", sky.bearing_from},
                          {"heads", sky.heads}};
        insert.bind(1, std::string_view(city.poles[sky.pole.place()].id))
            .bind(2, static_cast<std::int64_t>(sky.pole.place()));
        insert.bind(3, std::string_view(dumped(row)))
            .bind(4, floats_blob(sky.canopy_deg))
            .bind(5, floats_blob(sky.solid_deg));
        insert.bind(6, floats_blob(sky.unknown_deg)).run();
    }
}

std::optional<ShadeResult> read_shade(Database& database, const City& city) {
    const auto stored = run_json(database, Step::shade, "");
    if (!stored) return std::nullopt;
    return guarded([&] {
        ShadeResult result;
        result.seconds = stored->at("seconds");
        Statement select =
            database.prepare("SELECT place, json, canopy, solid, unknown FROM pole_skies ORDER BY place");
        while (select.step()) {
            const json row = json::parse(select.text(1));
            PoleShade sky;
            sky.pole = PoleIx(static_cast<std::size_t>(select.integer(0)));
            if (sky.pole.place() >= city.poles.size()) return result;
            sky.best = row.at("best");
            sky.panel_height_m = row.at("panel_height_m");
            sky.bearing_deg = row.at("bearing_deg");
            sky.bearing_from = row.at("bearing_from");
            sky.heads = row.at("heads").get<std::vector<HeadAnswer>>();
            sky.canopy_deg = floats_of(select.bytes(2));
            sky.solid_deg = floats_of(select.bytes(3));
            sky.unknown_deg = floats_of(select.bytes(4));
            result.poles.push_back(std::move(sky));
        }
        return result;
    });
}

void write_decide(Database& database, const City& city, const std::string& plan, const DecideResult& result,
                  const std::string& hash) {
    write_step_run(database, Step::decide, plan, hash, dumped(summary_of(result)));
    write_findings(database, Step::decide, plan, result.findings);
    Statement remove = database.prepare("DELETE FROM pole_decisions WHERE plan=?1");
    remove.bind(1, std::string_view(plan)).run();
    Statement insert = database.prepare("INSERT INTO pole_decisions VALUES (?1,?2,?3,?4)");
    for (const PoleDecision& decision : result.poles) {
        insert.bind(1, std::string_view(plan)).bind(2, static_cast<std::int64_t>(decision.pole.place()));
        insert.bind(3, std::string_view(city.poles[decision.pole.place()].id))
            .bind(4, std::string_view(dumped(decision)))
            .run();
    }
    write_span_layer(database, city, plan, result);
}

std::optional<DecideResult> read_decide(Database& database, const City& city, const std::string& plan) {
    const auto stored = run_json(database, Step::decide, plan);
    if (!stored) return std::nullopt;
    auto result = guarded([&] {
        DecideResult r = decide_of(*stored);
        Statement select = database.prepare("SELECT json FROM pole_decisions WHERE plan=?1 ORDER BY place");
        select.bind(1, std::string_view(plan));
        while (select.step()) r.poles.push_back(json::parse(select.text(0)).get<PoleDecision>());
        r.findings = read_findings(database, Step::decide, plan);
        return r;
    });
    if (!result || !fit(city, *result)) return std::nullopt;
    return result;
}

void write_phase(Database& database, const std::string& plan, const PhaseRun& run, const std::string& hash) {
    write_step_run(
        database, Step::phase, plan, hash,
        dumped(json{{"bound", run.bound}, {"seconds", run.seconds}, {"plan_hash", run.plan_hash}}));
}

std::optional<PhaseRun> read_phase(Database& database, const std::string& plan) {
    const auto stored = run_json(database, Step::phase, plan);
    if (!stored) return std::nullopt;
    return guarded([&] {
        return PhaseRun{stored->at("bound").get<double>(), stored->at("seconds").get<double>(),
                        stored->at("plan_hash").get<std::string>()};
    });
}

} // namespace unstring
