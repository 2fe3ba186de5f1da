#include "app/window/card/option_columns.h"

#include <QPainter>

#include <algorithm>
#include <map>

#include "app/window/look/signs.h"
#include "app/window/look/words.h"

namespace unstring {
namespace {

constexpr std::array<Choice, 3> kChoices{Choice::keep, Choice::rewire, Choice::solar};

QString parts_html(const OptionCost& option, const Look& look) {
    QString html = QStringLiteral("<table width='100%' cellspacing='0' cellpadding='0'>");
    for (const CostPart& part : cost_parts(option, 6))
        html += QStringLiteral("<tr><td style='color:%1'>%2</td><td align='right'>&nbsp;%3</td></tr>")
                    .arg(look.ink2.name(), part.what.toHtmlEscaped(), number_text(part.present_value));
    return html + QStringLiteral("</table>");
}

} // namespace

std::vector<CostPart> cost_parts(const OptionCost& option, std::size_t at_most) {
    std::map<QString, double> sums;
    for (const CashLine& line : option.lines) sums[to_q(line.what)] += to_dollars(line.amount) * line.factor;
    std::vector<CostPart> parts;
    for (const auto& [what, sum] : sums) parts.push_back({what, sum});
    std::stable_sort(parts.begin(), parts.end(), [](const CostPart& a, const CostPart& b) {
        return std::abs(a.present_value) > std::abs(b.present_value);
    });
    if (parts.size() <= at_most) return parts;
    CostPart rest{QObject::tr("other"), 0};
    for (std::size_t i = at_most - 1; i < parts.size(); ++i) rest.present_value += parts[i].present_value;
    parts.resize(at_most - 1);
    parts.push_back(rest);
    return parts;
}

OptionColumns::OptionColumns(Desk& desk, QWidget* parent) : QWidget(parent), desk_(desk) {
    setObjectName("options");
    auto* grid = new QGridLayout(this);
    grid->setContentsMargins(0, 8, 0, 0);
    grid->setHorizontalSpacing(14);
    grid->setVerticalSpacing(3);
    for (std::size_t i = 0; i < 3; ++i) {
        Column& column = columns_[i];
        const auto label = [&](int row, double size, Weight weight, const char* part) {
            auto* made = new QLabel(this);
            made->setFont(text_font(size, weight));
            made->setWordWrap(true);
            made->setAlignment(Qt::AlignLeft | Qt::AlignTop);
            made->setObjectName(QStringLiteral("%1_%2").arg(to_q(text_of(kChoices[i])), QLatin1String(part)));
            grid->addWidget(made, row, int(i));
            return made;
        };
        column.name = label(0, 13, Weight::strong, "name");
        column.name->setContentsMargins(20, 0, 0, 0);
        column.cost = label(1, 18, Weight::normal, "cost");
        column.parts = label(2, 11.5, Weight::normal, "parts");
        column.stopped = label(3, 12, Weight::bold, "stopped");
        grid->setColumnStretch(int(i), 1);
    }
}

void OptionColumns::set_decision(const PoleDecision* decision, Choice chosen) {
    chosen_ = chosen;
    const Look& look = desk_.look();
    for (std::size_t i = 0; i < 3; ++i) {
        const bool is_chosen = kChoices[i] == chosen;
        Column& column = columns_[i];
        column.name->setText(is_chosen ? tr("%1 <span style='color:%2'>chosen</span>")
                                             .arg(choice_word(kChoices[i]), look.ink2.name())
                                       : choice_word(kChoices[i]));
        column.cost->setFont(text_font(18, is_chosen ? Weight::bold : Weight::normal));
        if (decision == nullptr) {
            column.cost->setText(QStringLiteral("\u2013"));
            column.parts->clear(), column.stopped->clear();
            continue;
        }
        const OptionCost& option = decision->options[i];
        column.cost->setText(option.lines.empty() ? QStringLiteral("\u2013") : money_text(option.cost));
        column.parts->setText(parts_html(option, look));
        column.stopped->setText(option.possible
                                    ? QString()
                                    : tr("<span style='color:%1'>\u2501 stopped: %2</span>")
                                          .arg(look.trouble.name(), to_q(option.stopped_by).toHtmlEscaped()));
    }
    update();
}

void OptionColumns::paintEvent(QPaintEvent*) {
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    const Look& look = desk_.look();
    for (std::size_t i = 0; i < 3; ++i) {
        const QRect name = columns_[i].name->geometry();
        const bool is_chosen = kChoices[i] == chosen_;
        painter.fillRect(QRectF(name.left(), 1, name.width(), is_chosen ? 3 : 1),
                         is_chosen ? sign_color(look, sign_of(chosen_)) : look.hair);
        draw_pole_sign(painter, look, sign_of(kChoices[i]), true,
                       QPointF(name.left() + 7, std::min(name.center().y() + 1, name.top() + 11)), 6, false);
    }
}

} // namespace unstring
