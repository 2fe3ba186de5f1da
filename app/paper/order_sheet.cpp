#include "app/paper/order_sheet.h"

#include "app/paper/loop_sketch.h"
#include "app/paper/order_parts.h"
#include "app/paper/qr_code.h"

namespace unstring {
namespace {

void paint_sketch(Sheet& sheet, const WorkOrder& order) {
    if (order.loop.empty()) return;
    const double height = 165 * kPoint;
    sheet.need(height + 16 * kPoint);
    draw_loop(sheet, order, sheet.left(), sheet.y, sheet.width(), height);
    sheet.y += height + 2 * kPoint;
    sheet.y += sheet.text(sheet.left(), sheet.y, sheet.width(),
                          QStringLiteral("filled: this order   ring: stays lit on the string   cross: off "
                                         "before   solid: live when done   dashed: dead when done; "
                                         "straight lines from lamp to lamp, not the cable's true way"),
                          Type::small);
    sheet.y += 8 * kPoint;
}

} // namespace

void paint_furniture(Sheet& sheet, const WorkOrder& order, int pages) {
    const double qr = 44 * kPoint, top = sheet.y;
    const QString page =
        QStringLiteral("issue %1, page %2 of %3").arg(order.issue).arg(sheet.page()).arg(pages);
    const double column = sheet.width() - qr - 120 * kPoint;
    double below = top + sheet.text(sheet.left(), top, column, QStringLiteral("Work order ") + q(order.id),
                                    sheet.page() == 1 ? Type::title : Type::heading);
    if (sheet.page() == 1) {
        below += sheet.text(sheet.left(), below, column, q(order.title), Type::body);
        if (sheet.painter() != nullptr) draw_qr(*sheet.painter(), sheet.right() - qr, top, qr, q(order.id));
        sheet.text(sheet.right() - qr - 112 * kPoint, top, 104 * kPoint,
                   QStringLiteral("%1 crew\n%2")
                       .arg(q(text_of(order.crew)), page)
                       .replace('\n', QChar::LineSeparator),
                   Type::body, Qt::AlignRight);
        below = std::max(below, top + qr);
    } else {
        sheet.text(sheet.right() - 160 * kPoint, top, 160 * kPoint, page, Type::body, Qt::AlignRight);
    }
    sheet.rule(sheet.left(), sheet.right(), below + 4 * kPoint, 1.4);
    sheet.y = below + 10 * kPoint;
    const double foot = sheet.page_bottom() - 10 * kPoint;
    sheet.rule(sheet.left(), sheet.right(), foot - 3 * kPoint, 0.5, 120);
    sheet.text(sheet.left(), foot, sheet.width() - 120 * kPoint,
               QStringLiteral("An aid to a qualified person; no permit and no switching order. Local codes "
                              "and the owner's procedure govern."),
               Type::small);
    sheet.text(sheet.right() - 200 * kPoint, foot, 200 * kPoint, q(order.id) + QStringLiteral("  ") + page,
               Type::small, Qt::AlignRight);
}

void paint_order(Sheet& sheet, const WorkOrder& order) {
    sheet.start_page();
    paint_key_facts(sheet, order);
    paint_sketch(sheet, order);
    paint_cautions(sheet, order);
    paint_poles(sheet, order);
    paint_readings(sheet, order);
    paint_steps(sheet, order);
    paint_stores(sheet, order);
    paint_return(sheet, order);
}

} // namespace unstring
