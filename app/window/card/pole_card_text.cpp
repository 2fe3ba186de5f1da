// The longer texts of the pole card: its numbers and its history.

#include "app/window/card/pole_card.h"
#include "app/window/look/words.h"

namespace unstring {
namespace {

QString row_html(const QString& what, const QString& value, const Look& look) {
    return QStringLiteral("<tr><td style='color:%1;padding-right:10px'>%2</td><td align='right'>%3</td></tr>")
        .arg(look.ink2.name(), what.toHtmlEscaped(), value);
}

QString trouble_if(bool is_bold, const QString& text, const Look& look) {
    return is_bold ? QStringLiteral("<b><span style='color:%1'>%2</span></b>").arg(look.trouble.name(), text)
                   : text;
}

QString head_rows(const HeadAnswer& head, double nights_goal, const Look& look) {
    const bool is_over = head.nights_dark_year > nights_goal;
    const QString dark = trouble_if(is_over, number_text(head.nights_dark_year, 1), look) +
                         QObject::tr(", goal %1").arg(number_text(nights_goal, 1));
    return row_html(QObject::tr("sky open to the panel"), percent_text(head.sky_view_frac), look) +
           row_html(QObject::tr("shade score"), number_text(head.shade_score, 2), look) +
           row_html(QObject::tr("nights dark a year, battery at its end"), dark, look) +
           row_html(QObject::tr("the same, battery new"), number_text(head.nights_dark_year_new, 1), look) +
           row_html(QObject::tr("worst year"), number_text(head.nights_dark_worst_year, 1), look) +
           row_html(QObject::tr("longest dark run"), QObject::tr("%1 nights").arg(head.longest_dark_run),
                    look) +
           row_html(QObject::tr("battery lasts"),
                    QObject::tr("%1 years").arg(number_text(head.battery_years, 1)), look);
}

} // namespace

QString PoleCard::numbers_html(const PoleDecision* decision, const PoleShade* shade) const {
    const Look& look = desk_.look();
    QString html;
    if (shade != nullptr) {
        for (std::size_t i = 0; i < shade->heads.size(); ++i) {
            const HeadAnswer& head = shade->heads[i];
            const QString verdict = head.eligible
                                        ? tr("fits")
                                        : QStringLiteral("<span style='color:%1'>%2</span>")
                                              .arg(look.trouble.name(), to_q(head.why).toHtmlEscaped());
            html += QStringLiteral("<tr><td colspan='2'><b>%1</b>: %2</td></tr>")
                        .arg(to_q(head.head).toHtmlEscaped(), verdict);
            if (int(i) == shade->best) html += head_rows(head, desk_.view().plan.settings.nights_goal, look);
        }
    }
    if (decision != nullptr) {
        if (decision->choice == Choice::rewire) {
            html +=
                row_html(tr("volts at the lamp"), number_text(decision->volts, 1), look) +
                row_html(tr("voltage drop"), tr("%1 %").arg(number_text(100 * decision->drop_frac, 1)), look);
            html += row_html(
                tr("its share of the trench"),
                tr("%1 m, %2").arg(number_text(decision->trench_m, 1), money_text(decision->trench_share)),
                look);
        }
        if (decision->breakeven_trench_m >= 0)
            html += row_html(tr("solar and rewire cost the same at"),
                             tr("%1 m of trench").arg(number_text(decision->breakeven_trench_m, 1)), look);
    }
    return html.isEmpty() ? QString()
                          : QStringLiteral("<table width='100%' cellspacing='0' cellpadding='1'>") + html +
                                QStringLiteral("</table>");
}

void PoleCard::show_history() {
    const std::vector<EditLine> lines = desk_.history(desk_.view().city.poles[pole_.place()].id, 4);
    QString html;
    for (std::size_t i = 0; i < lines.size() && i < 3; ++i) {
        const QString at = to_q(lines[i].at).left(16).replace('T', ' ');
        html += QStringLiteral("<tr><td style='padding-right:10px'><b>%1</b></td><td>%2%3</td></tr>")
                    .arg(at.toHtmlEscaped(), to_q(lines[i].label).toHtmlEscaped(),
                         lines[i].who.empty()
                             ? QString()
                             : QStringLiteral(" <span style='color:%1'>(%2)</span>")
                                   .arg(desk_.look().ink2.name(), to_q(lines[i].who).toHtmlEscaped()));
    }
    history_->setText(html.isEmpty() ? QString()
                                     : QStringLiteral("<table cellspacing='0' cellpadding='1'>") + html +
                                           QStringLiteral("</table>"));
    history_->setVisible(!html.isEmpty());
    all_history_->setVisible(lines.size() > 3);
}

} // namespace unstring
