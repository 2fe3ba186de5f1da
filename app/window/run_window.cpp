#include "app/window/run_window.h"

#include <QApplication>
#include <QLocale>

#include "app/paper/pdf_printer.h"
#include "app/window/file_doors.h"
#include "app/window/look/look.h"

namespace unstring {

int run_window(int argc, char** argv, const std::string& project_path) {
    QLocale::setDefault(QLocale(QLocale::English, QLocale::UnitedStates));
    QApplication application(argc, argv);
    QApplication::setApplicationName(QStringLiteral("Unstring"));
    QApplication::setFont(text_font(12.5));
    MainWindow window(file_doors(make_pdf_printer(argc, argv)));
    window.show();
    if (!project_path.empty()) window.open_path(project_path);
    return QApplication::exec();
}

} // namespace unstring
