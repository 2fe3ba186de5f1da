#include "tests/app/window/small_city.h"

#include <QDir>
#include <QElapsedTimer>
#include <QImage>
#include <QTest>

#include <algorithm>
#include <cmath>
#include <stdexcept>

namespace unstring::test {
namespace {

constexpr int kFirstYear = 2027, kYears = 5;

Pole lamp(const std::string& id, StringIx string, int order, MapPoint place) {
    Pole pole;
    pole.id = id;
    pole.string = string;
    pole.order = order;
    pole.place = place;
    pole.has_place = true;
    pole.fixture = "HPS150";
    pole.lamp_w = 188, pole.lamp_pf = 0.9;
    pole.mount_m = 8.5, pole.arm_m = 2.4;
    pole.pole_kind = "steel";
    pole.street = "Osprey Lane";
    pole.ward = "3";
    pole.feed = Feed::underground;
    pole.duct = Duct::inspected;
    return pole;
}

// A loop out along one side of a street and back on the other.
void add_string(City& city, const std::string& id, const std::string& prefix, int lamps, MapPoint station) {
    const StringIx string{city.strings.size()};
    SeriesString record;
    record.id = id;
    record.current_a = 6.6;
    record.station = station;
    record.cable_awg = 8, record.cable_kv = 5;
    city.strings.push_back(record);
    const int out = (lamps + 1) / 2;
    for (int position = 1; position <= lamps; ++position) {
        const bool is_out = position <= out;
        const int column = is_out ? position : lamps + 1 - position;
        const MapPoint place{station.x_m - 25.0 * column - (is_out ? 0 : 8),
                             station.y_m + (is_out ? 18.0 : -18.0)};
        city.poles.push_back(lamp(prefix + "-" + std::to_string(100 + position), string, position, place));
    }
    Transformer unit;
    unit.id = "T" + std::to_string(city.transformers.size() + 1);
    unit.rated_kw = lamps > 40 ? 20 : lamps > 20 ? 10 : 5;
    unit.output_a = 6.6, unit.min_frac = 0.3;
    unit.taps = {1};
    unit.state = UnitState::in_service;
    unit.strings = {string};
    city.transformers.push_back(unit);
    Street street;
    street.name = id == "S-01" ? "Osprey Lane" : id == "S-02" ? "Kiln Street" : "Longford Avenue North";
    street.width_m = 24;
    street.line = {{station.x_m + 60, station.y_m}, {station.x_m - 25.0 * out - 80, station.y_m}};
    city.streets.push_back(street);
}

OptionCost option(double cost, bool possible, const std::string& stopped_by, const Plan& plan) {
    OptionCost made;
    made.possible = possible;
    made.stopped_by = stopped_by;
    made.lines = {cash_line(plan, "works", 2028, 1, cost * 0.6, Purse::capital),
                  cash_line(plan, "energy", 2029, 100, cost * 0.003, Purse::operating),
                  cash_line(plan, "upkeep", 2030, 1, cost * 0.1, Purse::operating)};
    made.cost = std::round(present_value(made.lines) * 100) / 100;
    return made;
}

PoleShade shade_of(PoleIx pole, bool is_dark) {
    PoleShade shade;
    shade.pole = pole;
    shade.best = 0;
    shade.panel_height_m = 7.6, shade.bearing_deg = 180, shade.bearing_from = "south";
    HeadAnswer head;
    head.head = "medium";
    head.sky_view_frac = is_dark ? 0.61 : 0.93;
    head.shade_score = is_dark ? 0.62 : 0.08;
    for (std::size_t m = 0; m < 12; ++m) {
        const double season = std::cos((double(m) - 5.5) / 6.0 * 3.14159265);
        head.supply_kwh[m] = (is_dark ? 9.0 : 15.0) + 5.0 * season;
        head.demand_kwh[m] = 11.0 - 2.5 * season;
        head.panel_kwh_m2[m] = 100 + 40 * season;
    }
    head.nights_dark_year = is_dark ? 61 : 0.4, head.nights_dark_worst_year = is_dark ? 74 : 2;
    head.battery_years = 9.4, head.longest_dark_run = is_dark ? 9 : 1;
    head.eligible = !is_dark;
    head.why = is_dark ? "61 nights dark a year, goal 3" : "";
    shade.heads = {head};
    for (int i = 0; i < 72; ++i) {
        const double bearing = 5.0 * i;
        shade.canopy_deg.push_back(
            float(bearing > 120 && bearing < 250 && is_dark ? 38 + 8 * std::sin(bearing / 9) : 4));
        shade.solid_deg.push_back(float(bearing > 60 && bearing < 110 ? 24 : 2));
        shade.unknown_deg.push_back(0);
    }
    return shade;
}

void add_decisions(ProjectView& view) {
    DecideResult decide;
    ShadeResult shade;
    for (std::size_t i = 0; i < view.city.poles.size(); ++i) {
        const PoleIx pole{i};
        if (!is_candidate(view.city, view.city.poles[i])) continue;
        const bool is_dark = i % 3 != 0;
        PolePlan& row = view.plan.poles[i];
        row.choice = is_dark ? Choice::rewire : Choice::solar;
        row.head = is_dark ? "" : "medium";
        PoleDecision decision;
        decision.pole = pole;
        decision.choice = row.choice;
        decision.options = {
            option(9840, false, "the string ends in 2031", view.plan), option(6310, true, "", view.plan),
            option(5120, !is_dark, is_dark ? "61 nights dark a year, goal 3" : "", view.plan)};
        decision.reason = is_dark ? "Rewired because crowns to the south hide the winter sun and five "
                                    "neighbours share its trench; alone it would cost $7,900."
                                  : "Solar is $1,190 cheaper than rewire, and the sky is open enough.";
        decision.numbers = {{"trench_m", 6.2}};
        decision.sources = {"prices: the default book"};
        decision.trench_m = 6.2, decision.trench_share = 2480, decision.volts = 118.6,
        decision.drop_frac = 0.024, decision.breakeven_trench_m = 3.1;
        decide.poles.push_back(decision);
        shade.poles.push_back(shade_of(pole, is_dark));
    }
    view.decide = decide;
    view.shade = shade;
}

// The far end first: the deeper a lamp lies, the earlier its year.
void add_years(ProjectView& view) {
    for (std::size_t i = 0; i < view.city.poles.size(); ++i) {
        const Pole& pole = view.city.poles[i];
        if (!is_candidate(view.city, pole)) continue;
        const int lamps =
            int(std::count_if(view.city.poles.begin(), view.city.poles.end(),
                              [&pole](const Pole& other) { return other.string == pole.string; }));
        const int depth = *pole.order <= (lamps + 1) / 2 ? *pole.order : lamps + 1 - *pole.order;
        const int deepest = (lamps + 1) / 2;
        view.plan.poles[i].year = kFirstYear + std::min(kYears - 1, (deepest - depth) * 4 / deepest);
        view.plan.poles[i].year_by = YearBy::solver;
    }
}

} // namespace

std::shared_ptr<ProjectView> small_view() {
    auto view = std::make_shared<ProjectView>();
    view->path = "/made/up/small.unstring";
    City& city = view->city;
    city.crs = "EPSG:32608";
    city.centre = {-130, 34};
    add_string(city, "S-01", "01", 12, {600, 400});
    add_string(city, "S-02", "02", 25, {650, 250});
    add_string(city, "Longford Avenue North (1938)", "L", 60, {800, 100});
    SeriesString parallel;
    parallel.id = "P-9", parallel.kind = CircuitKind::parallel;
    city.strings.push_back(parallel);
    for (int i = 0; i < 5; ++i)
        city.poles.push_back(lamp("P-" + std::to_string(i), StringIx{3}, i + 1, {100.0 + 30 * i, 480}));
    city.poles[20].status = PoleStatus::down;
    city.poles[3].critical = true;
    city.cutbacks.push_back(
        {StringIx{0}, "S-01", "01-103", "01-110", CutBackKind::pullbox, true, 12.0, false, {}});
    city.cutbacks.push_back(
        {StringIx{0}, "S-01", "01-105", "01-108", CutBackKind::trench, false, 14.0, false, {}});
    city.services.push_back({"SV-1", ServiceKind::service, {300, 420}, true, "", 240, 12.0, 6.0, false, {}});
    city.obstacles.push_back({{{420, 300}, {460, 300}, {460, 340}, {420, 340}}, 9});
    city.canopy.push_back({{{500, 420}, {520, 425}, {525, 440}, {505, 445}}, 11, Leaf::deciduous, false});
    view->catalog.cables = {{8, Metal::copper, 2.55, 0.2, 20, 50}};
    view->plan = new_plan(city, "first");
    view->plan.settings.first_year = kFirstYear, view->plan.settings.years = kYears;
    add_decisions(*view);
    add_years(*view);
    view->findings = {make_finding("pole-near-twin", "poles.csv", 14, "02-101", "0.4 m from 02-102",
                                   "0.5 m or more", "Measure again, or remove one row", "poles"),
                      make_finding("span-long", "poles.csv", 22, "02-109", "span of 131 m", "at most 120 m",
                                   "Check the wiring order", "poles")};
    for (StepState& step : view->steps) step = {StepStanding::up_to_date, 0, 0, "2026-11-30T10:41:00"};
    view->steps[1].warnings = 2;
    view->steps[5].standing = StepStanding::not_yet;
    view->phase = counted_phase(*view, view->plan);
    return view;
}

PhaseResult counted_phase(const ProjectView& view, const Plan& plan) {
    PhaseResult phase;
    for (int year = kFirstYear; year < kFirstYear + kYears; ++year) {
        PhaseYear row;
        row.year = year;
        row.money_limit = 130000, row.line_limit_h = 200, row.lighting_limit_h = 400;
        phase.years.push_back(row);
    }
    for (std::size_t s = 0; s < view.city.strings.size(); ++s) {
        if (view.city.strings[s].kind != CircuitKind::series) continue;
        for (int year = kFirstYear - 1; year < kFirstYear + kYears; ++year) {
            StringYear state;
            state.string = StringIx{s};
            state.year = year;
            state.transformer = TransformerIx{s};
            for (std::size_t i = 0; i < plan.poles.size(); ++i)
                if (view.city.poles[i].string == state.string &&
                    is_candidate(view.city, view.city.poles[i]) &&
                    (plan.poles[i].year == 0 || plan.poles[i].year > year))
                    ++state.lamps;
            state.load_kva = state.load_kw = 0.3 * state.lamps;
            state.volts = 1000 * state.load_kva / 6.6;
            state.cable_m = 25.0 * state.lamps;
            state.loading_frac = state.load_kva / view.city.transformers[s].rated_kw;
            state.verdict = verdict_of(true, state.lamps, state.loading_frac, 0.3);
            phase.string_years.push_back(state);
            if (year >= kFirstYear)
                phase.years[std::size_t(year - kFirstYear)].series_lamps_left += state.lamps;
        }
    }
    for (const PolePlan& row : plan.poles) {
        phase.pole_year.push_back(row.year);
        if (row.year == 0) continue;
        PhaseYear& year = phase.years[std::size_t(row.year - kFirstYear)];
        year.money += to_cents(4000), year.hours.line += 6, year.hours.lighting += 4;
        (row.choice == Choice::solar ? year.solar : year.rewire) += 1;
        phase.cost += 4000 * plan.factor(row.year);
    }
    phase.bound = phase.cost * 0.97;
    for (const PhaseYear& year : phase.years)
        if (year.hours.line > *year.line_limit_h)
            phase.failures.push_back(
                make_finding("hours-short", "", 0, "year " + std::to_string(year.year),
                             std::to_string(int(year.hours.line)) + " h of the line crew", "200 h",
                             "Move work to another year"));
    return phase;
}

std::shared_ptr<SmallCity> small_city(std::shared_ptr<ProjectView> view) {
    auto city = std::make_shared<SmallCity>();
    city->view = std::move(view);
    return city;
}

ProjectLink link_to(const std::shared_ptr<SmallCity>& city) {
    ProjectLink link;
    link.view = [city] { return city->view; };
    link.edit = [city](const Plan& next, const std::string& label) -> Expected<Change> {
        Change change = plan_difference(city->view->city, city->view->plan, next, label);
        if (change.is_empty()) return change;
        auto made = std::make_shared<ProjectView>(*city->view);
        made->plan = next;
        made->phase = counted_phase(*made, next);
        made->undo_label = label, made->redo_label.clear();
        city->before.push_back(city->view);
        city->after.clear();
        city->labels.push_back(label);
        city->history.insert(city->history.begin(),
                             EditLine{std::int64_t(city->labels.size()), "2026-12-01T10:42:07", "east ward",
                                      "first", label, 0});
        city->view = made;
        return change;
    };
    link.undo = [city]() -> Expected<std::optional<Change>> {
        if (city->before.empty()) return std::optional<Change>();
        Change change;
        change.label = city->view->undo_label;
        city->after.push_back(city->view);
        city->view = city->before.back();
        city->before.pop_back();
        return std::optional(change);
    };
    link.redo = [city]() -> Expected<std::optional<Change>> {
        if (city->after.empty()) return std::optional<Change>();
        city->before.push_back(city->view);
        city->view = city->after.back();
        city->after.pop_back();
        Change change;
        change.label = city->view->undo_label;
        return std::optional(change);
    };
    link.history = [city](const std::string&, int at_most) -> Expected<std::vector<EditLine>> {
        return std::vector<EditLine>(city->history.begin(),
                                     city->history.begin() +
                                         std::min<long>(at_most, long(city->history.size())));
    };
    link.preview = [city](const Plan& next) {
        ++city->previews;
        return counted_phase(*city->view, next);
    };
    link.run_step = [city](Step, const Progress& progress) -> Expected<void> {
        for (int i = 0; i < 100; ++i) {
            if (progress.is_cancelled()) {
                ++city->steps_cancelled;
                return tl::make_unexpected(Fault{FaultCode::cancelled, "", 0, "", "stopped", "", ""});
            }
            progress.at(i / 100.0);
            QTest::qSleep(10);
        }
        ++city->steps_ended;
        return {};
    };
    link.set_aside = [city](const Progress&) -> Expected<void> {
        auto made = std::make_shared<ProjectView>(*city->view);
        made->steps[1].standing = StepStanding::up_to_date;
        made->steps[1].errors = 0;
        city->view = made;
        return {};
    };
    link.hand_out = [city](const HandOutOptions& options,
                           const Progress&) -> Expected<std::vector<std::string>> {
        city->handed_out.push_back(options);
        return std::vector<std::string>{options.to + "/orders.csv"};
    };
    return link;
}

Doors closed_doors() {
    Doors doors;
    doors.open = [](const std::string& path) -> Expected<ProjectLink> {
        return tl::make_unexpected(Fault{FaultCode::file_missing, path, 0, "", "no such file",
                                         "a project file", "Choose another file"});
    };
    doors.gather = [](const GatherWish&, const Progress&) -> Expected<std::vector<std::string>> {
        return std::vector<std::string>{};
    };
    return doors;
}

void settle(int ms) { QTest::qWait(ms); }

std::string save_picture(QWidget& widget, const std::string& name, double ratio) {
    QImage picture(widget.size() * ratio, QImage::Format_ARGB32_Premultiplied);
    picture.setDevicePixelRatio(ratio);
    picture.fill(Qt::white);
    widget.render(&picture);
    QDir().mkpath(QStringLiteral("artefacts/window"));
    const QString path = QStringLiteral("artefacts/window/%1.png").arg(QString::fromStdString(name));
    if (!picture.save(path)) throw std::runtime_error("cannot write " + path.toStdString());
    return path.toStdString();
}

double drawn_frac(QWidget& widget) {
    const QImage picture = widget.grab().toImage().convertToFormat(QImage::Format_RGB32);
    const QRgb ground = picture.pixel(3, 3);
    long other = 0;
    for (int y = 0; y < picture.height(); ++y)
        for (int x = 0; x < picture.width(); ++x) other += picture.pixel(x, y) != ground ? 1 : 0;
    return double(other) / (double(picture.width()) * picture.height());
}

} // namespace unstring::test
