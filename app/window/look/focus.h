#pragma once
// Whether the focus came by the keys: then its frame is drawn.

#include <QFocusEvent>

namespace unstring {

[[nodiscard]] inline bool is_by_keys(const QFocusEvent& event) {
    return event.reason() == Qt::TabFocusReason || event.reason() == Qt::BacktabFocusReason ||
           event.reason() == Qt::ShortcutFocusReason;
}

} // namespace unstring
