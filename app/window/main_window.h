#pragma once
// The window: step line above, map and card, rail and ledger below.

#include <QLabel>
#include <QSplitter>
#include <QStackedWidget>
#include <QTabBar>
#include <QWidget>

#include <functional>

#include "app/window/desk.h"
#include "app/window/gather_dialog.h"
#include "app/window/map/map_view.h"
#include "app/window/rail/rail_view.h"
#include "app/window/stepline/step_line.h"

namespace unstring {

class LedgerView;
class StartPage;

/// What the window asks of the outside: handed in, so that tests need no files.
struct Doors {
    std::function<Expected<ProjectLink>(const std::string& path)> open;
    /// Reads files into a project; called from a working thread.
    std::function<Expected<std::vector<std::string>>(const GatherWish& wish, const Progress& progress)>
        gather;
};

class MainWindow : public QWidget {
    Q_OBJECT
public:
    explicit MainWindow(Doors doors, QWidget* parent = nullptr);
    ~MainWindow() override;

    void show_project(ProjectLink link);
    /// Opens a file; what is wrong is said in the window.
    bool open_path(const std::string& path);
    void gather(const GatherWish& wish);
    [[nodiscard]] Desk& desk() { return desk_; }

    enum class Side { pole, string, findings, history };
    void show_side(Side side);

protected:
    void dragEnterEvent(QDragEnterEvent* event) override;
    void dropEvent(QDropEvent* event) override;
    void closeEvent(QCloseEvent* event) override;
    void resizeEvent(QResizeEvent* event) override;

private:
    void build();
    QWidget* build_side();
    void build_keys();
    void take_look();
    void take_view();
    void step_clicked(Step step);
    void run_step(Step step);
    void ask_open();
    void ask_gather();
    void ask_hand_out();
    void show_every_number(PoleIx pole);
    void finish_gather();

    struct GatherEnd {
        std::optional<Fault> fault;
        std::vector<std::string> notes;
        std::string path;
    };

    Doors doors_;
    Desk desk_;
    StepLine* line_ = nullptr;
    QLabel* read_only_ = nullptr;
    QStackedWidget* pages_ = nullptr;
    StartPage* start_ = nullptr;
    MapView* map_ = nullptr;
    RailView* rail_ = nullptr;
    LedgerView* ledger_ = nullptr;
    QSplitter *across_ = nullptr, *down_ = nullptr;
    QTabBar* tabs_ = nullptr;
    QStackedWidget* side_ = nullptr;
    QFutureWatcher<GatherEnd> gathering_;
    std::atomic<bool> stop_gathering_ = false;
};

} // namespace unstring
