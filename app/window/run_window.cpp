#include "app/window/run_window.h"

#include <QApplication>
#include <QLocale>

#include "app/paper/pdf_printer.h"
#include "app/steps/gather.h"
#include "app/window/look/look.h"
#include "app/window/main_window.h"

namespace unstring {
namespace {

Doors real_doors(std::shared_ptr<Printer> printer) {
    Doors doors;
    doors.open = [printer](const std::string& path) -> Expected<ProjectLink> {
        auto project = OpenProject::open(path);
        if (!project) return tl::make_unexpected(project.error());
        return link_to(std::shared_ptr<OpenProject>(std::move(*project)), printer);
    };
    doors.gather = [](const GatherWish& wish, const Progress& progress) -> Expected<std::vector<std::string>> {
        auto report = gather_project(wish.project_path, wish.files, progress);
        if (!report) return tl::make_unexpected(report.error());
        return std::move(report->notes);
    };
    return doors;
}

}  // namespace

int run_window(int argc, char** argv, const std::string& project_path) {
    QLocale::setDefault(QLocale(QLocale::English, QLocale::UnitedStates));
    QApplication application(argc, argv);
    QApplication::setApplicationName(QStringLiteral("Unstring"));
    QApplication::setFont(text_font(12.5));
    MainWindow window(real_doors(make_pdf_printer(argc, argv)));
    window.show();
    if (!project_path.empty()) window.open_path(project_path);
    return QApplication::exec();
}

}  // namespace unstring
