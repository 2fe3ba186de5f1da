#include "app/window/desk.h"

#include <algorithm>

#include "app/window/look/words.h"

namespace unstring {

Desk::Desk(QObject* parent) : QObject(parent) {
    connect(&watcher_, &QFutureWatcherBase::finished, this, &Desk::finish_step);
}

Desk::~Desk() {
    cancel_ = true;
    watcher_.waitForFinished();
}

void Desk::open(ProjectLink link) {
    link_ = std::move(link);
    preview_.reset();
    selection_.clear();
    string_ = {};
    year_ = 0;
    take_view();
}

void Desk::close() {
    preview_.reset();
    selection_.clear();
    selected_.clear();
    string_ = {};
    scene_.reset();
    link_ = {};
    Q_EMIT selection_changed();
    Q_EMIT closed();
}

void Desk::take_view() {
    scene_ = make_scene(link_.view());
    const PlanSettings& settings = view().plan.settings;
    selected_.assign(view().city.poles.size(), 0);
    std::erase_if(selection_, [this](PoleIx pole) { return pole.place() >= selected_.size(); });
    for (const PoleIx pole : selection_) selected_[pole.place()] = 1;
    if (string_.is_valid() && string_.place() >= view().city.strings.size()) string_ = {};
    if (year_ == 0) year_ = settings.first_year;
    year_ = std::clamp(year_, settings.first_year - 1, view().plan.last_year());
    Q_EMIT view_changed();
}

const PhaseResult* Desk::phase() const {
    if (preview_) return &preview_->phase;
    return view().phase ? &*view().phase : nullptr;
}

void Desk::set_night(bool is_night) {
    if (is_night == is_night_) return;
    is_night_ = is_night;
    Q_EMIT look_changed();
}

bool Desk::is_selected(PoleIx pole) const {
    return pole.place() < selected_.size() && selected_[pole.place()] != 0;
}

void Desk::select(std::vector<PoleIx> poles) {
    selection_ = std::move(poles);
    std::fill(selected_.begin(), selected_.end(), 0);
    for (const PoleIx pole : selection_) selected_[pole.place()] = 1;
    if (!selection_.empty()) {
        const StringIx string = view().city.poles[selection_.back().place()].string;
        if (string.is_valid() && !scene().loops[string.place()].lamps.empty()) string_ = string;
    }
    Q_EMIT selection_changed();
}

void Desk::walk(int by) {
    if (!is_open()) return;
    if (selection_.empty()) {
        if (string_.is_valid() && !scene().loops[string_.place()].lamps.empty())
            select({scene().loops[string_.place()].lamps.front()});
        else if (!scene().series.empty())
            select({scene().loops[scene().series.front().place()].lamps.front()});
    } else {
        const PoleIx from = selection_.back();
        const int position = scene().position[from.place()];
        const StringIx string = view().city.poles[from.place()].string;
        if (position == 0 || !string.is_valid()) return;
        const auto& lamps = scene().loops[string.place()].lamps;
        select({lamps[std::size_t(std::clamp(position + by, 1, int(lamps.size())) - 1)]});
    }
    if (!selection_.empty()) Q_EMIT show_place(view().city.poles[selection_.back().place()].place);
}

void Desk::choose_string(StringIx string) {
    string_ = string;
    selection_.clear();
    std::fill(selected_.begin(), selected_.end(), 0);
    Q_EMIT selection_changed();
}

void Desk::set_year(int year) {
    if (!is_open()) return;
    year = std::clamp(year, view().plan.settings.first_year - 1, view().plan.last_year());
    if (year == year_) return;
    year_ = year;
    Q_EMIT year_changed();
}

std::vector<EditLine> Desk::history(const std::string& pole_id, int at_most) const {
    if (is_running()) return {}; // the file belongs to the step until it ends
    const auto lines = link_.history(pole_id, at_most);
    return lines ? *lines : std::vector<EditLine>{};
}

bool Desk::jump_to(const std::string& record) {
    const City& city = view().city;
    if (const PoleIx pole = find_pole(city, record); pole.is_valid()) {
        select({pole});
        if (city.poles[pole.place()].has_place) Q_EMIT show_place(city.poles[pole.place()].place);
        return true;
    }
    if (const StringIx string = find_string(city, record); string.is_valid()) {
        choose_string(string);
        if (city.strings[string.place()].station) Q_EMIT show_place(*city.strings[string.place()].station);
        return true;
    }
    for (const ServicePoint& service : city.services)
        if (service.id == record && service.has_place) {
            Q_EMIT show_place(service.place);
            return true;
        }
    for (const Transformer& unit : city.transformers)
        if (unit.id == record && !unit.strings.empty() && unit.strings.front().is_valid())
            return jump_to(city.strings[unit.strings.front().place()].id);
    if (record.starts_with("year ")) {
        set_year(QString::fromStdString(record).mid(5).toInt());
        return true;
    }
    return false;
}

} // namespace unstring
