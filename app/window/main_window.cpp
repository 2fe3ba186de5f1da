#include "app/window/main_window.h"

#include <QShortcut>
#include <QVBoxLayout>

#include "app/window/card/every_number.h"
#include "app/window/card/findings_list.h"
#include "app/window/card/history_list.h"
#include "app/window/card/pole_card.h"
#include "app/window/card/string_card.h"
#include "app/window/ledger/ledger_view.h"
#include "app/window/look/words.h"
#include "app/window/map/year_strip.h"
#include "app/window/notice.h"
#include "app/window/start_page.h"

namespace unstring {

MainWindow::MainWindow(Doors doors, QWidget* parent) : QWidget(parent), doors_(std::move(doors)) {
    setObjectName("unstring_window");
    setWindowTitle(tr("Unstring"));
    setAcceptDrops(true);
    setMinimumSize(760, 460);
    resize(1600, 1000);
    build();
    build_keys();
    connect(&desk_, &Desk::look_changed, this, &MainWindow::take_look);
    connect(&desk_, &Desk::view_changed, this, &MainWindow::take_view);
    connect(&desk_, &Desk::closed, this, [this] { pages_->setCurrentWidget(start_); });
    connect(&gathering_, &QFutureWatcherBase::finished, this, &MainWindow::finish_gather);
    take_look();
    start_->setFocus();
}

MainWindow::~MainWindow() {
    stop_gathering_ = true;
    gathering_.waitForFinished();
}

void MainWindow::build() {
    auto* column = new QVBoxLayout(this);
    column->setContentsMargins(0, 0, 0, 0);
    column->setSpacing(0);
    line_ = new StepLine(desk_, this);
    read_only_ = new QLabel(this);
    read_only_->setObjectName("read_only_banner");
    read_only_->setWordWrap(true);
    read_only_->setContentsMargins(16, 6, 16, 6);
    read_only_->setFont(text_font(12.5, Weight::bold));
    read_only_->hide();
    pages_ = new QStackedWidget(this);
    start_ = new StartPage(pages_);
    down_ = new QSplitter(Qt::Vertical, pages_);
    down_->setObjectName("split_down");
    across_ = new QSplitter(Qt::Horizontal, down_);
    across_->setObjectName("split_across");
    auto* ground = new QWidget(across_);
    auto* ground_column = new QVBoxLayout(ground);
    ground_column->setContentsMargins(0, 0, 0, 0);
    ground_column->setSpacing(0);
    map_ = new MapView(desk_, ground);
    ground_column->addWidget(map_, 1);
    ground_column->addWidget(new YearStrip(desk_, *map_, ground));
    across_->addWidget(ground);
    across_->addWidget(build_side());
    across_->setStretchFactor(0, 1);
    across_->setStretchFactor(1, 0);
    across_->setSizes({1188, 412});
    across_->setChildrenCollapsible(true);
    across_->setCollapsible(0, false);
    auto* foot = new QWidget(down_);
    auto* foot_column = new QVBoxLayout(foot);
    foot_column->setContentsMargins(0, 0, 0, 0);
    foot_column->setSpacing(0);
    ledger_ = new LedgerView(desk_, foot);
    rail_ = new RailView(desk_, foot);
    foot_column->addWidget(ledger_);
    foot_column->addWidget(rail_, 1);
    down_->addWidget(across_);
    down_->addWidget(foot);
    down_->setStretchFactor(0, 3);
    down_->setStretchFactor(1, 2);
    down_->setSizes({540, 408});
    down_->setHandleWidth(2);
    across_->setHandleWidth(2);
    pages_->addWidget(start_);
    pages_->addWidget(down_);
    column->addWidget(line_);
    column->addWidget(read_only_);
    column->addWidget(pages_, 1);
    new Notice(desk_, pages_);
    connect(rail_, &RailView::drag_changed, this, [this] {
        const auto& drag = rail_->drag();
        if (!drag) return;
        const QString id = to_q(desk_.view().city.strings[drag->string.place()].id);
        const QString next =
            drag->boundary.next_year == 0 ? tr("no year") : QString::number(drag->boundary.next_year);
        ledger_->set_heading(tr("%1, the boundary %2 | %3: %4")
                                 .arg(id)
                                 .arg(drag->boundary.year)
                                 .arg(next, rail_->drag_text().section('\n', 0, 0)));
    });
    connect(line_, &StepLine::step_clicked, this, &MainWindow::step_clicked);
    connect(line_, &StepLine::run_wanted, this, &MainWindow::run_step);
    connect(line_, &StepLine::findings_wanted, this, [this] { show_side(Side::findings); });
    connect(start_, &StartPage::open_wanted, this, &MainWindow::ask_open);
    connect(start_, &StartPage::gather_wanted, this, &MainWindow::ask_gather);
}

QWidget* MainWindow::build_side() {
    auto* panel = new QWidget(across_);
    panel->setObjectName("side");
    panel->setMinimumWidth(300);
    auto* column = new QVBoxLayout(panel);
    column->setContentsMargins(0, 0, 0, 0);
    column->setSpacing(0);
    tabs_ = new QTabBar(panel);
    tabs_->setObjectName("side_tabs");
    tabs_->setAccessibleName(tr("What the card shows"));
    tabs_->setDrawBase(false);
    tabs_->setExpanding(false);
    tabs_->setFont(text_font(12.5, Weight::strong));
    for (const QString& word : {tr("pole"), tr("string"), tr("findings"), tr("history")}) tabs_->addTab(word);
    side_ = new QStackedWidget(panel);
    auto* card = new PoleCard(desk_, side_);
    side_->addWidget(card);
    side_->addWidget(new StringCard(desk_, side_));
    side_->addWidget(new FindingsList(desk_, side_));
    side_->addWidget(new HistoryList(desk_, side_));
    column->addWidget(tabs_);
    column->addWidget(side_, 1);
    connect(tabs_, &QTabBar::currentChanged, side_, &QStackedWidget::setCurrentIndex);
    connect(card, &PoleCard::every_number_wanted, this, &MainWindow::show_every_number);
    connect(card, &PoleCard::all_history_wanted, this, [this] { show_side(Side::history); });
    connect(&desk_, &Desk::selection_changed, this, [this] {
        const auto shown = Side(tabs_->currentIndex());
        if (shown != Side::pole && shown != Side::string) return;
        if (!desk_.selection().empty())
            show_side(Side::pole);
        else if (desk_.chosen_string().is_valid())
            show_side(Side::string);
    });
    return panel;
}

void MainWindow::build_keys() {
    const auto key = [this](const QKeySequence& keys, auto act) {
        auto* shortcut = new QShortcut(keys, this);
        connect(shortcut, &QShortcut::activated, this, act);
    };
    key(Qt::Key_K, [this] { desk_.mark(Choice::keep); });
    key(Qt::Key_R, [this] { desk_.mark(Choice::rewire); });
    key(Qt::Key_S, [this] { desk_.mark(Choice::solar); });
    key(Qt::Key_L, [this] { desk_.lock(); });
    key(Qt::Key_U, [this] { desk_.clear_marks(); });
    key(Qt::Key_BracketLeft, [this] { desk_.set_year(desk_.year() - 1); });
    key(Qt::Key_BracketRight, [this] { desk_.set_year(desk_.year() + 1); });
    key(QKeySequence(Qt::CTRL | Qt::Key_Z), [this] { desk_.undo(); });
    key(QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_Z), [this] { desk_.redo(); });
    key(QKeySequence(Qt::CTRL | Qt::Key_O), [this] { ask_open(); });
    key(Qt::Key_F5, [this] { step_clicked(line_->next_step()); });
    key(Qt::Key_F9, [this] { desk_.set_night(!desk_.look().is_night); });
    key(QKeySequence(Qt::CTRL | Qt::Key_1), [this] { show_side(Side::pole); });
    key(QKeySequence(Qt::CTRL | Qt::Key_2), [this] { show_side(Side::string); });
    key(QKeySequence(Qt::CTRL | Qt::Key_3), [this] { show_side(Side::findings); });
    key(QKeySequence(Qt::CTRL | Qt::Key_4), [this] { show_side(Side::history); });
}

void MainWindow::show_side(Side side) { tabs_->setCurrentIndex(int(side)); }

void MainWindow::take_look() {
    const Look& look = desk_.look();
    setStyleSheet(
        style_sheet(look) +
        QStringLiteral(
            "QTabBar::tab{padding:7px 12px;color:%1;background:%2;border:none;border-bottom:2px solid %2;}"
            "QTabBar::tab:selected{color:%3;border-bottom:2px solid %3;}"
            "#read_only_banner{background:%4;color:%5;}")
            .arg(look.ink2.name(), look.sheet.name(), look.ink.name(), look.band.name(),
                 look.band_ink.name()));
    start_->set_look(look);
}

void MainWindow::take_view() {
    pages_->setCurrentWidget(down_);
    const ProjectView& view = desk_.view();
    setWindowTitle(tr("%1 - Unstring").arg(to_q(view.path).section('/', -1)));
    read_only_->setVisible(view.is_read_only);
    if (view.is_read_only)
        read_only_->setText(tr("Open to read only: %1. Everything can be looked at, nothing is written.")
                                .arg(to_q(view.read_only_reason)));
}

void MainWindow::show_project(ProjectLink link) {
    desk_.open(std::move(link));
    map_->fit();
    map_->setFocus();
}

void MainWindow::show_every_number(PoleIx pole) { (new EveryNumber(desk_, pole, this))->show(); }

void MainWindow::resizeEvent(QResizeEvent* event) {
    QWidget::resizeEvent(event);
    // A small window keeps the map whole: the card gives way first, then the rail.
    const int side = width() >= 1400 ? 412 : width() >= 1100 ? 380 : 320;
    across_->setSizes({width() - side - 2, side});
    const int foot = height() >= 900 ? 408 : std::max(240, int(0.42 * height()));
    down_->setSizes({height() - 52 - foot, foot});
}

} // namespace unstring
