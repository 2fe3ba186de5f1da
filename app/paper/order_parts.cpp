#include "app/paper/order_parts.h"

#include <algorithm>
#include <array>
#include <set>

namespace unstring {
namespace {

constexpr double kGap = 4 * kPoint;

/// Value of a fact by its label; empty where the order has none.
QString fact(const WorkOrder& order, const char* label) {
    for (const auto& [name, text] : order.facts)
        if (name == label) return q(text);
    return {};
}

struct Column {
    const char* head;
    double share;
};

/// Heads of a table, drawn again at the top of each page.
template <std::size_t n>
void table_head(Sheet& sheet, const std::array<Column, n>& columns) {
    double x = sheet.left(), height = 0;
    for (const Column& column : columns) {
        height = std::max(height, sheet.text(x, sheet.y, column.share * sheet.width() - kGap,
                                             QString::fromLatin1(column.head), Type::small));
        x += column.share * sheet.width();
    }
    sheet.y += height + kGap / 2;
    sheet.rule(sheet.left(), sheet.right(), sheet.y, 0.8);
    sheet.y += kGap / 2;
}

void blank_line(Sheet& sheet, const QString& label, double x, double width) {
    const double words = 58 * kPoint;
    sheet.text(x, sheet.y, words, label, Type::body);
    sheet.rule(x + words, x + width - kGap, sheet.y + 11 * kPoint, 0.5, 90);
}

} // namespace

void paint_heading(Sheet& sheet, const QString& words, double least_below) {
    sheet.need(22 * kPoint + least_below);
    sheet.y += 6 * kPoint;
    sheet.y += sheet.text(sheet.left(), sheet.y, sheet.width(), words, Type::heading) + kGap;
}

void paint_key_facts(Sheet& sheet, const WorkOrder& order) {
    const std::array<std::pair<QString, QString>, 7> facts = {
        {{QStringLiteral("year"), QString::number(order.year)},
         {QStringLiteral("crew-hours"), QString::number(order.hours, 'f', 1)},
         {QStringLiteral("poles"), QString::number(order.poles.size())},
         {QStringLiteral("open-circuit kV"), fact(order, "open-circuit kV")},
         {QStringLiteral("approach, gloves"), fact(order, "approach distance, gloves")},
         {QStringLiteral("lights due on from"), q(order.switch_on_time)},
         {QStringLiteral("traffic"), fact(order, "traffic")}}};
    const std::array<double, 7> shares = {.07, .10, .07, .16, .20, .14, .26};
    double x = sheet.left(), height = 0;
    for (std::size_t i = 0; i < facts.size(); ++i) {
        const double column = shares[i] * sheet.width() - kGap;
        const double label = sheet.text(x, sheet.y, column, facts[i].first, Type::small);
        const QString value = facts[i].second.isEmpty() ? QStringLiteral("-") : facts[i].second;
        height = std::max(height, label + sheet.text(x, sheet.y + label, column, value, Type::strong));
        x += shares[i] * sheet.width();
    }
    sheet.y += height + kGap;
    sheet.rule(sheet.left(), sheet.right(), sheet.y, 0.5, 120);
    sheet.y += 2 * kGap;
}

void paint_poles(Sheet& sheet, const WorkOrder& order) {
    if (order.poles.empty()) return;
    constexpr std::array<Column, 5> kColumns = {
        {{"pole", .16}, {"place", .17}, {"work", .30}, {"mind", .22}, {"done        serial, date", .15}}};
    const auto column = [&](std::size_t i) { return kColumns[i].share * sheet.width() - kGap; };
    paint_heading(sheet,
                  order.loop.empty() ? QStringLiteral("Poles, the most worth knowing first")
                                     : QStringLiteral("Poles in working order, far end first"),
                  40 * kPoint);
    table_head(sheet, kColumns);
    for (const OrderPole& pole : order.poles) {
        QString work = q(pole.task);
        if (pole.volts > 0) work += QStringLiteral("; %1 V planned").arg(pole.volts, 0, 'f', 1);
        const std::array<QString, 4> cells = {q(pole.id), q(pole.street), work, q(pole.warning)};
        const std::array<Type, 4> types = {Type::tag, Type::body, Type::body, Type::strong};
        double height = 14 * kPoint;
        for (std::size_t i = 0; i < cells.size(); ++i)
            height = std::max(height, sheet.text_height(column(i), cells[i], types[i]));
        if (sheet.need(height + kGap)) table_head(sheet, kColumns);
        double x = sheet.left();
        for (std::size_t i = 0; i < cells.size(); ++i) {
            sheet.text(x, sheet.y, column(i), cells[i], types[i]);
            x += kColumns[i].share * sheet.width();
        }
        sheet.box(x, sheet.y + kPoint, 9 * kPoint, 9 * kPoint, 0.8);
        sheet.rule(x + 14 * kPoint, sheet.right(), sheet.y + 11 * kPoint, 0.5, 90);
        sheet.y += height + kGap / 2;
        sheet.rule(sheet.left(), sheet.right(), sheet.y, 0.4, 160);
        sheet.y += kGap / 2;
    }
}

void paint_steps(Sheet& sheet, const WorkOrder& order) {
    if (order.steps.empty()) return;
    const double number = 20 * kPoint, sign = 150 * kPoint, words = sheet.width() - number - sign;
    paint_heading(
        sheet,
        QStringLiteral(
            "Steps, signed one by one; barred grey steps are hold points: signed before the next begins"),
        40 * kPoint);
    for (std::size_t i = 0; i < order.steps.size(); ++i) {
        const OrderStep& step = order.steps[i];
        const QString text = q(step.text) + (step.hold_point ? QStringLiteral(" (hold)") : QString());
        const Type type = step.hold_point || step.caution ? Type::strong : Type::body;
        const double height = std::max(12 * kPoint, sheet.text_height(words - 2 * kGap, text, type)) + kGap;
        sheet.need(height);
        if (step.hold_point) {
            sheet.fill(sheet.left(), sheet.y, sheet.width(), height, 228);
            sheet.fill(sheet.left(), sheet.y, 3 * kPoint, height, 0);
        }
        sheet.text(sheet.left() + 6 * kPoint, sheet.y + kGap / 2, number, QString::number(i + 1),
                   Type::strong);
        sheet.text(sheet.left() + number, sheet.y + kGap / 2, words - 2 * kGap, text, type);
        sheet.box(sheet.right() - sign, sheet.y + 2 * kPoint, 9 * kPoint, 9 * kPoint, 0.8);
        sheet.rule(sheet.right() - sign + 16 * kPoint, sheet.right() - 4 * kPoint, sheet.y + 12 * kPoint, 0.5,
                   60);
        sheet.y += height;
        sheet.rule(sheet.left(), sheet.right(), sheet.y, 0.4, 160);
    }
    sheet.y += kGap;
}

void paint_readings(Sheet& sheet, const WorkOrder& order) {
    static const std::set<std::string> kInHead = {"open-circuit kV", "approach distance, gloves", "traffic"};
    paint_heading(sheet, QStringLiteral("What to know"), 30 * kPoint);
    const double label = 150 * kPoint;
    for (const auto& [name, text] : order.facts) {
        if (kInHead.count(name) != 0) continue;
        const double height =
            std::max({12 * kPoint, sheet.text_height(sheet.width() - label, q(text), Type::strong),
                      sheet.text_height(label - kGap, q(name), Type::body)});
        sheet.need(height + kGap / 2);
        sheet.text(sheet.left(), sheet.y, label - kGap, q(name), Type::body);
        if (text.empty())
            sheet.rule(sheet.left() + label, sheet.left() + label + 180 * kPoint, sheet.y + 11 * kPoint, 0.5,
                       60);
        else
            sheet.text(sheet.left() + label, sheet.y, sheet.width() - label, q(text), Type::strong);
        sheet.y += height + kGap / 2;
    }
    if (order.as_found.empty()) return;
    paint_heading(sheet, QStringLiteral("Readings, written down as found"), 30 * kPoint);
    const double half = sheet.width() / 2;
    for (std::size_t i = 0; i < order.as_found.size(); i += 2) {
        sheet.need(18 * kPoint);
        for (std::size_t k = i; k < std::min(i + 2, order.as_found.size()); ++k) {
            const double x = sheet.left() + (k - i == 0 ? 0 : half);
            sheet.text(x, sheet.y + 2 * kPoint, 150 * kPoint, q(order.as_found[k].first), Type::body);
            sheet.box(x + 150 * kPoint, sheet.y, 60 * kPoint, 14 * kPoint, 0.6);
            sheet.text(x + 214 * kPoint, sheet.y + 2 * kPoint, 40 * kPoint, q(order.as_found[k].second),
                       Type::body);
        }
        sheet.y += 18 * kPoint;
    }
}

void paint_cautions(Sheet& sheet, const WorkOrder& order) {
    if (order.cautions.empty()) return;
    const double pad = 8 * kPoint, column = sheet.width() - 2 * pad;
    QString words;
    for (const std::string& caution : order.cautions)
        words += (words.isEmpty() ? QString() : QStringLiteral(" ")) + q(caution);
    const double head = sheet.text_height(column, QStringLiteral("Cautions"), Type::heading);
    const double height = head + sheet.text_height(column, words, Type::body) + 2 * pad;
    sheet.need(height);
    sheet.box(sheet.left(), sheet.y, sheet.width(), height, 1.6);
    sheet.text(sheet.left() + pad, sheet.y + pad / 2, column, QStringLiteral("Cautions that always stand"),
               Type::heading);
    sheet.text(sheet.left() + pad, sheet.y + pad / 2 + head + kGap / 2, column, words, Type::body);
    sheet.y += height + kGap;
}

void paint_stores(Sheet& sheet, const WorkOrder& order) {
    const auto list = [&](const QString& heading, const std::vector<QString>& rows) {
        if (rows.empty()) return;
        paint_heading(sheet, heading, 14 * kPoint);
        for (const QString& row : rows) {
            const double height = sheet.text_height(sheet.width(), row, Type::body);
            sheet.need(height);
            sheet.text(sheet.left(), sheet.y, sheet.width(), row, Type::body);
            sheet.y += height + kGap / 2;
        }
    };
    std::vector<QString> stores, after, open;
    for (const Material& material : order.materials)
        stores.push_back(QStringLiteral("%1 %2   %3")
                             .arg(QString::number(material.quantity, 'f', material.unit == "each" ? 0 : 1),
                                  q(material.unit), q(material.what)));
    for (const std::string& id : order.after)
        after.push_back(q(id) + QStringLiteral("   signed off: ____________________"));
    for (const std::string& finding : order.findings) open.push_back(q(finding));
    list(QStringLiteral("Taken from stores"), stores);
    list(QStringLiteral("Only after these orders are signed off"), after);
    list(QStringLiteral("Open findings"), open);
}

void paint_return(Sheet& sheet, const WorkOrder& /*order*/) {
    sheet.need(100 * kPoint);
    paint_heading(sheet, QStringLiteral("What differed on site; wiring order as built"), 60 * kPoint);
    for (int i = 0; i < 3; ++i) {
        sheet.y += 15 * kPoint;
        sheet.rule(sheet.left(), sheet.right(), sheet.y, 0.5, 90);
    }
    sheet.y += 12 * kPoint;
    const double third = sheet.width() / 3;
    for (int i = 0; i < 3; ++i) {
        constexpr std::array<const char*, 3> kWho = {"crew lead", "date", "safety watch"};
        blank_line(sheet, QString::fromLatin1(kWho[static_cast<std::size_t>(i)]), sheet.left() + i * third,
                   third);
    }
    sheet.y += 16 * kPoint;
}

} // namespace unstring
