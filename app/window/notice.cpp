#include "app/window/notice.h"

#include <QEvent>

#include <algorithm>

namespace unstring {
namespace {

constexpr int kStays_ms = 7000;

} // namespace

Notice::Notice(Desk& desk, QWidget* over) : QLabel(over), desk_(desk) {
    setObjectName("notice");
    setWordWrap(true);
    setFont(text_font(12.5, Weight::strong));
    setTextFormat(Qt::PlainText);
    hide();
    over->installEventFilter(this);
    timer_.setSingleShot(true);
    connect(&timer_, &QTimer::timeout, this, &QLabel::hide);
    connect(&desk_, &Desk::said, this, &Notice::show_words);
    connect(&desk_, &Desk::look_changed, this, &Notice::take_look);
}

void Notice::show_words(const QString& words, bool is_trouble) {
    is_trouble_ = is_trouble;
    setText(words);
    setAccessibleName(words);
    take_look();
    setToolTip(is_trouble ? tr("Click to put it away") : QString());
    place();
    show();
    raise();
    if (is_trouble)
        timer_.stop();
    else
        timer_.start(kStays_ms);
}

void Notice::take_look() {
    const Look& look = desk_.look();
    setStyleSheet(
        QStringLiteral("background:%1;color:%2;border:1px solid %3;border-radius:4px;padding:7px 12px;")
            .arg(look.raise.name(), is_trouble_ ? look.trouble.name() : look.ink.name(),
                 is_trouble_ ? look.trouble.name() : look.hair.name()));
}

void Notice::place() {
    const int room = parentWidget()->width() - 32;
    const int wide = std::min(room, QFontMetrics(font()).horizontalAdvance(text()) + 34);
    setGeometry(16, 12, wide, heightForWidth(wide));
}

void Notice::mousePressEvent(QMouseEvent*) { hide(); }

bool Notice::eventFilter(QObject* watched, QEvent* event) {
    if (event->type() == QEvent::Resize && isVisible()) place();
    return QLabel::eventFilter(watched, event);
}

} // namespace unstring
