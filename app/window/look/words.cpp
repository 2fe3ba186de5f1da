#include "app/window/look/words.h"

#include <QLocale>
#include <QObject>

#include <cmath>

namespace unstring {
namespace {

const QLocale& numbers() {
    static const QLocale locale(QLocale::English, QLocale::UnitedStates);
    return locale;
}

int lamps_of(const ProjectView& view, StringIx string) {
    int lamps = 0;
    for (const Pole& pole : view.city.poles)
        if (pole.string == string && is_candidate(view.city, pole)) ++lamps;
    return lamps;
}

} // namespace

QString number_text(double value, int decimals) {
    if (!std::isfinite(value)) return QStringLiteral("-");
    if (std::abs(value) < 0.5 * std::pow(10.0, -decimals)) value = 0; // no "-0"
    return numbers().toString(value, 'f', decimals);
}

QString money_text(double dollars) {
    if (!std::isfinite(dollars)) return QStringLiteral("-");
    const QString amount = number_text(std::abs(dollars));
    return (dollars < -0.5 ? QStringLiteral("-$") : QStringLiteral("$")) + amount;
}

QString thousands_text(double dollars) {
    const double thousands = dollars / 1000.0;
    return number_text(thousands, std::abs(thousands) < 9.95 && std::abs(thousands) > 0 ? 1 : 0);
}

QString percent_text(double fraction) { return QObject::tr("%1 %").arg(number_text(100.0 * fraction)); }

QString count_text(long count, const QString& one, const QString& many) {
    return QStringLiteral("%1 %2").arg(number_text(double(count)), count == 1 ? one : many);
}

QString choice_word(Choice choice) {
    return choice == Choice::undecided ? QObject::tr("not decided") : to_q(text_of(choice));
}

QString verdict_word(Verdict verdict) {
    switch (verdict) {
    case Verdict::open:
        return QObject::tr("no unit");
    case Verdict::over:
        return QObject::tr("over");
    case Verdict::tight:
        return QObject::tr("tight");
    case Verdict::good:
        return QObject::tr("good");
    case Verdict::light:
        return QObject::tr("light");
    case Verdict::low:
        return QObject::tr("low");
    case Verdict::none:
        break;
    }
    return QObject::tr("ends");
}

bool is_trouble(Verdict verdict) {
    return verdict == Verdict::open || verdict == Verdict::over || verdict == Verdict::low;
}

QString step_word(Step step) {
    switch (step) {
    case Step::gather:
        return QObject::tr("gather");
    case Step::vet:
        return QObject::tr("vet");
    case Step::shade:
        return QObject::tr("shade");
    case Step::decide:
        return QObject::tr("decide");
    case Step::phase:
        return QObject::tr("phase");
    case Step::hand_out:
        break;
    }
    return QObject::tr("hand out");
}

QString standing_text(Step step, const StepState& state) {
    const QString errors = count_text(state.errors, QObject::tr("error"), QObject::tr("errors"));
    switch (state.standing) {
    case StepStanding::not_yet:
        return QObject::tr("not yet");
    case StepStanding::stale:
        return QObject::tr("stale");
    case StepStanding::stopped:
        return QObject::tr("stopped by %1").arg(errors);
    case StepStanding::by_hand: {
        const QString clock = to_q(state.at).section('T', 1).left(5);
        return clock.isEmpty() ? QObject::tr("by hand") : QObject::tr("by hand since %1").arg(clock);
    }
    case StepStanding::up_to_date:
        break;
    }
    if (step == Step::vet || step == Step::phase) {
        if (state.errors > 0) return errors;
        if (state.warnings > 0)
            return count_text(state.warnings, QObject::tr("warning"), QObject::tr("warnings"));
    }
    return QObject::tr("up to date");
}

QString service_word(ServiceKind kind) {
    switch (kind) {
    case ServiceKind::service:
        return QObject::tr("service point");
    case ServiceKind::circuit_end:
        return QObject::tr("end of a lighting circuit");
    case ServiceKind::candidate:
        break;
    }
    return QObject::tr("candidate service");
}

QString severity_word(Severity severity) {
    switch (severity) {
    case Severity::error:
        return QObject::tr("error");
    case Severity::warning:
        return QObject::tr("warning");
    case Severity::notice:
        break;
    }
    return QObject::tr("notice");
}

QString lamp_text(const ProjectView& view, PoleIx pole) {
    const Pole& record = view.city.poles[pole.place()];
    if (!record.string.is_valid())
        return record.string_given.empty()
                   ? QObject::tr("no circuit")
                   : QObject::tr("circuit %1 is not known").arg(to_q(record.string_given));
    const QString id = to_q(view.city.strings[record.string.place()].id);
    if (is_parallel(view.city, record)) return QObject::tr("%1, a parallel circuit").arg(id);
    if (!record.order) return QObject::tr("%1, place in the wiring order not known").arg(id);
    return QObject::tr("%1, lamp %2 of %3").arg(id).arg(*record.order).arg(lamps_of(view, record.string));
}

QString string_sentence(const ProjectView& view, const StringYear& state) {
    const QString id = to_q(view.city.strings[state.string.place()].id);
    const QString when = state.year < view.plan.settings.first_year ? QObject::tr("today")
                                                                    : QObject::tr("in %1").arg(state.year);
    if (state.lamps == 0) return QObject::tr("String %1 %2: no lamps left, out of service.").arg(id, when);
    const QString load =
        QObject::tr("String %1 %2: %3, %4 kV, %5 kVA")
            .arg(id, when, count_text(state.lamps, QObject::tr("lamp"), QObject::tr("lamps")),
                 number_text(state.volts / 1000.0, 2), number_text(state.load_kva, 1));
    if (!state.transformer.is_valid())
        return QObject::tr("%1, and no transformer is known for it.").arg(load);
    const Transformer& unit = view.city.transformers[state.transformer.place()];
    const QString tap =
        state.tap < 0.999 ? QObject::tr(" at tap %1").arg(number_text(state.tap, 2)) : QString();
    return QObject::tr("%1 on the %2 kW transformer %3%4 (%5, %6).")
        .arg(load, number_text(unit.rated_kw, unit.rated_kw == std::floor(unit.rated_kw) ? 0 : 1),
             to_q(unit.id), tap, percent_text(state.loading_frac), verdict_word(state.verdict));
}

QString finding_text(const Finding& finding) {
    QString text = to_q(finding.found);
    if (!finding.wanted.empty()) text += QObject::tr("; wanted: %1").arg(to_q(finding.wanted));
    if (!finding.remedy.empty()) text += QStringLiteral(". ") + to_q(finding.remedy);
    return text;
}

QString standing_cautions() {
    return QObject::tr("Series strings can carry thousands of volts. An opened string can rise to the "
                       "transformer's full open-circuit voltage: never "
                       "open a live string. A dark lamp is not a dead pole; dead by day is not isolated. "
                       "Isolate, lock, tag, prove dead, ground "
                       "before touching. Local codes, the owner's switching procedure and licensed practice "
                       "govern. The plan is an aid to a "
                       "qualified person, no permit and no switching order. A wind-load or light-level "
                       "result is a screening, to be confirmed by a "
                       "licensed engineer.");
}

} // namespace unstring
